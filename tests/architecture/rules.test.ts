import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { configKeys } from '#server/platform/config.ts';
import { projectDirectory } from '#scripts/setup.mjs';
import { scriptOf, sourceFiles } from './project-files.ts';

const files = sourceFiles();
const product = files.filter(({ path }) => /^(src|server|worker|shared|migrations|oidc-fake|scripts)\//.test(path));
const lineCount = (text: string) => text.split('\n').length - 1;
const named = (paths: readonly { path: string }[]) => paths.map(({ path }) => path);

describe('sizes', () => {
  it('no file is longer than 300 lines, no test longer than 500', () => {
    const long = files.filter(({ path, text }) => lineCount(text) > (/\.test\.ts$|^tests\//.test(path) ? 500 : 300));
    expect(named(long)).toEqual([]);
  });

  it('no component has a script or template of more than 150 lines', () => {
    const long = files.filter((file) => {
      if (!file.path.endsWith('.vue')) return false;
      const template = /<template>[\s\S]*<\/template>/.exec(file.text)?.[0] ?? '';
      return lineCount(scriptOf(file).trimStart()) > 150 || lineCount(template) > 150;
    });
    expect(named(long)).toEqual([]);
  });
});

describe('names', () => {
  it('files are kebab-case, components PascalCase of two words or more', () => {
    const wrong = product.filter(({ path }) => {
      const name = path.split('/').at(-1) ?? '';
      if (path.startsWith('migrations/2')) return !/^\d{14}_[a-z_]+\.ts$/.test(name);
      return name.endsWith('.vue')
        ? !/^(App|([A-Z][a-z0-9]+){2,})\.vue$/.test(name)
        : !/^([A-Z][A-Za-z0-9]+\.test\.ts|[a-z0-9-]+(\.[a-z-]+)*\.m?ts)$/.test(name);
    });
    expect(named(wrong)).toEqual([]);
  });

  it('no folder is called utils, helpers, common, misc or types', () => {
    expect(named(files.filter(({ path }) => /(^|\/)(utils|helpers|common|misc|types)\//.test(path)))).toEqual([]);
  });
});

describe('the client', () => {
  it('has colours in the theme only', () => {
    const literals = files.filter(
      ({ path, text }) =>
        path.startsWith('src/') &&
        !path.startsWith('src/theme/') &&
        !path.endsWith('.test.ts') &&
        /#[0-9a-f]{6}\b|#[0-9a-f]{3};|\brgb\(\d/i.test(text),
    );
    expect(named(literals)).toEqual([]);
  });

  it('formats numbers in the units only, and never writes raw HTML', () => {
    const own = files.filter(
      ({ path, text }) =>
        path.startsWith('src/views/') &&
        !path.endsWith('.test.ts') &&
        (/v-html/.test(text) || /formatNumber\(/.test(text)),
    );
    expect(named(own)).toEqual([]);
  });
});

describe('settings', () => {
  it('are read by the configuration alone', () => {
    const readers = product.filter(
      ({ path, text }) =>
        /process\.env/.test(text) && !/^(server\/platform\/config\.ts|scripts\/|oidc-fake\/main\.ts)/.test(path),
    );
    expect(named(readers)).toEqual([]);
  });

  it.each(['README.md', 'DEVELOPERS.md'])('all stand in %s', (document) => {
    const text = readFileSync(join(projectDirectory, document), 'utf8');
    expect(configKeys.filter((key) => !text.includes(key))).toEqual([]);
  });
});

describe('types', () => {
  it('are not given up', () => {
    const loose = product.filter(({ text }) =>
      /:\s*any\b|\bas any\b|<any>|as unknown as|@ts-ignore|@ts-expect-error|eslint-disable/.test(text),
    );
    expect(named(loose)).toEqual([]);
  });
});
