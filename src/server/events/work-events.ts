import { EventEmitter } from 'node:events';

const emitter = new EventEmitter();

/** Tells the server's own workers and the fleet's that there may be something to do, or no longer. */
export const workEvents = {
  changed(): void {
    emitter.emit('changed');
  },
  /** @returns a function that ends the watch. */
  watch(listener: () => void): () => void {
    emitter.on('changed', listener);
    return () => emitter.off('changed', listener);
  },
};
