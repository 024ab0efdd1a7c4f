import { createRouter, createWebHistory, type RouteLocationNormalized, type Router } from 'vue-router';
import { ApiProblem } from '#src/api/api-problem.ts';
import { call, connectSession } from '#src/api/call.ts';
import { useSessionStore } from '#src/stores/session.ts';
import { routes } from './routes.ts';

function signedOutAt(to: RouteLocationNormalized) {
  return { path: '/signed-out', query: { returnTo: to.fullPath } };
}

/** Loads the session; false only when nobody is signed in. A service that cannot answer is not a sign-out. */
async function loadSession(): Promise<boolean> {
  const store = useSessionStore();
  try {
    store.set(await call('getSession'));
  } catch (error) {
    if (error instanceof ApiProblem && error.problem.code === 'not-signed-in') return false;
    store.fail(error instanceof Error ? error : new Error(String(error)));
  }
  return true;
}

/** Loads the session once; without one, pages lead to the sign-in. */
export function makeRouter(): Router {
  const router = createRouter({ history: createWebHistory(), routes });
  const store = useSessionStore();
  connectSession({
    csrfToken: () => store.csrfToken,
    onSignedOut: () => {
      store.set(null);
      const here = router.currentRoute.value;
      if (here.meta.isPublic !== true && here.matched.length > 0) void router.push(signedOutAt(here));
    },
  });
  router.beforeEach(async (to) => {
    if (to.meta.isPublic === true || store.session !== null) return true;
    return (await loadSession()) || signedOutAt(to);
  });
  router.afterEach((to) => {
    document.title = to.meta.title === undefined ? 'Stillspan' : `${to.meta.title} · Stillspan`;
  });
  return router;
}
