import type { EndResponse } from '../ends/end-response.ts';

/** Responses of ends kept between span wires that share wire, tension, dampers and frequencies. */
export interface EndResponseCache {
  readonly hitCount: number;
  readonly missCount: number;
  /** The kept response of a key, or a new one, which is then kept. */
  readonly obtain: (key: string, compute: () => EndResponse) => EndResponse;
}

const defaultLimitCount = 256;

/**
 * A cache of end responses; the one used longest ago is dropped when it is full.
 *
 * @param limitCount largest number of responses kept, whole number ≥ 1; each takes some 10 kB at 150 frequencies
 * @returns an empty cache, for one thread of work
 * @source closed form: responses depend on the key alone
 */
export function createEndResponseCache(limitCount: number = defaultLimitCount): EndResponseCache {
  const kept = new Map<string, EndResponse>();
  const counts = { hit: 0, miss: 0 };
  return {
    get hitCount() {
      return counts.hit;
    },
    get missCount() {
      return counts.miss;
    },
    obtain: (key, compute) => {
      const known = kept.get(key);
      if (known !== undefined) {
        counts.hit += 1;
        kept.delete(key);
        kept.set(key, known);
        return known;
      }
      counts.miss += 1;
      const made = compute();
      kept.set(key, made);
      const oldest = kept.keys().next();
      if (kept.size > limitCount && oldest.done !== true) kept.delete(oldest.value);
      return made;
    },
  };
}
