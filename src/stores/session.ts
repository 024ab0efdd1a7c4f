import { defineStore } from 'pinia';
import { computed, shallowRef } from 'vue';
import type { Role } from '#shared/contract/roles.ts';
import type { Session } from '#shared/contract/session.ts';

/** Who is signed in; null before it is known and when nobody is. */
export const useSessionStore = defineStore('session', () => {
  const session = shallowRef<Session | null>(null);
  const problem = shallowRef<Error | null>(null);
  const roles = computed<readonly Role[]>(() => session.value?.roles ?? []);
  return {
    session,
    /** Why it is not known, when the service could not say. */
    problem,
    roles,
    csrfToken: computed(() => session.value?.csrfToken ?? ''),
    hasRole: (...wanted: Role[]) => wanted.some((role) => roles.value.includes(role)),
    set: (next: Session | null) => {
      session.value = next;
      problem.value = null;
    },
    fail: (error: Error) => {
      problem.value = error;
    },
  };
});
