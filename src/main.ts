import { QueryClient, VueQueryPlugin } from '@tanstack/vue-query';
import { createPinia } from 'pinia';
import { Dialog, Notify, Quasar } from 'quasar';
import svgIcons from 'quasar/icon-set/svg-material-icons';
import 'quasar/dist/quasar.css';
import '#src/theme/base.css';
import { createApp } from 'vue';
import { ApiProblem } from '#src/api/api-problem.ts';
import App from './App.vue';
import { makeRouter } from './router/router.ts';

const retryCount = 2;
const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 10_000,
      // What the service refuses stays refused; only a lost connection is worth another try.
      retry: (failureCount, error) =>
        failureCount < retryCount && error instanceof ApiProblem && error.problem.code === 'upstream-failed',
    },
  },
});

createApp(App)
  .use(createPinia())
  .use(Quasar, { iconSet: svgIcons, plugins: { Dialog, Notify } })
  .use(VueQueryPlugin, { queryClient })
  .use(makeRouter())
  .mount('#app');
