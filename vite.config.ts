import { fileURLToPath } from 'node:url';
import vue from '@vitejs/plugin-vue';
import { quasar, transformAssetUrls } from '@quasar/vite-plugin';
import { defineConfig } from 'vitest/config';

const apiOrigin = process.env['STILLSPAN_DEV_API_ORIGIN'] ?? 'http://127.0.0.1:8080';

// vue-leaflet imports the CommonJS build; without the alias Leaflet is bundled twice.
const leafletAlias = {
  find: /^leaflet$/,
  replacement: fileURLToPath(new URL('./node_modules/leaflet/dist/leaflet-src.esm.js', import.meta.url)),
};

const node = (name: string, include: string[], more: object = {}) => ({
  extends: true as const,
  test: { name, include, environment: 'node', ...more },
});

export default defineConfig({
  plugins: [vue({ template: { transformAssetUrls } }), quasar({ sassVariables: false })],
  resolve: { alias: [leafletAlias] },
  build: { target: 'es2022', sourcemap: true },
  server: {
    proxy: Object.fromEntries(['/api', '/auth', '/health'].map((path) => [path, { target: apiOrigin, ws: false }])),
  },
  test: {
    passWithNoTests: false,
    projects: [
      node('unit', ['{shared,server,worker,oidc-fake,scripts}/**/*.test.ts']),
      {
        extends: true,
        test: {
          name: 'client',
          include: ['src/**/*.test.ts'],
          environment: 'happy-dom',
          server: { deps: { inline: [/vue-leaflet/] } },
        },
      },
      node('reference', ['tests/reference/**/*.test.ts'], { testTimeout: 120_000 }),
      node('contract', ['tests/contract/**/*.test.ts'], { testTimeout: 60_000, hookTimeout: 120_000 }),
      node('integration', ['tests/integration/**/*.test.ts'], {
        testTimeout: 120_000,
        hookTimeout: 180_000,
        fileParallelism: false,
      }),
      node('architecture', ['tests/architecture/**/*.test.ts'], { testTimeout: 120_000 }),
      node('e2e', ['tests/e2e/**/*.test.ts'], { testTimeout: 240_000, hookTimeout: 300_000, fileParallelism: false }),
    ],
  },
});
