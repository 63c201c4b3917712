import { Redis } from 'ioredis';

/** A connection that waits for Redis as long as it is away, and says so once each time. */
export function openRedis(url: string, onAway: (message: string) => void): Redis {
  const redis = new Redis(url, {
    maxRetriesPerRequest: null,
    retryStrategy: (times) => Math.min(2000, 100 * times),
    connectTimeout: 3000,
  });
  let isAway = false;
  redis.on('error', (error) => {
    if (!isAway) onAway(error.message || String(error));
    isAway = true;
  });
  redis.on('ready', () => {
    isAway = false;
  });
  return redis;
}

/** The address without its password. */
export const shownUrl = (url: string): string => url.replace(/\/\/.*@/, '//…@');
