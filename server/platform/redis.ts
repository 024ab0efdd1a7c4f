import { Redis } from 'ioredis';

/** A connection that fails fast, for producers and publishers: a lost Redis must not hold up a request. */
export function openFailFastRedis(url: string): Redis {
  return new Redis(url, {
    maxRetriesPerRequest: 1,
    enableOfflineQueue: false,
    lazyConnect: false,
    connectTimeout: 2000,
  });
}

/** A connection that waits for Redis to come back, for workers and subscribers. */
export function openWaitingRedis(url: string): Redis {
  return new Redis(url, { maxRetriesPerRequest: null });
}
