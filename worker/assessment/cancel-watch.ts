import { cancelChannel } from '#shared/contract/jobs.ts';

interface Subscriber {
  subscribe(channel: string): Promise<unknown>;
  on(event: 'message', listener: (channel: string, message: string) => void): unknown;
}

/** Signals that turn when somebody asks an assessment to stop. */
export interface CancelWatch {
  watch(assessmentId: string): { signal: AbortSignal; done: () => void };
}

/** Hears cancel requests over Redis; a request missed there is seen in the row when the next chunk is claimed. */
export function cancelWatch(subscriber: Subscriber): CancelWatch {
  const running = new Map<string, Set<AbortController>>();
  subscriber.on('message', (channel, assessmentId) => {
    if (channel !== cancelChannel) return;
    for (const controller of running.get(assessmentId) ?? []) controller.abort();
  });
  subscriber.subscribe(cancelChannel).catch(() => undefined);
  return {
    watch: (assessmentId) => {
      const controller = new AbortController();
      const controllers = running.get(assessmentId) ?? new Set();
      running.set(assessmentId, controllers.add(controller));
      return {
        signal: controller.signal,
        done: () => {
          controllers.delete(controller);
          if (controllers.size === 0) running.delete(assessmentId);
        },
      };
    },
  };
}
