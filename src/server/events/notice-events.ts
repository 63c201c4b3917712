import { EventEmitter } from 'node:events';

const emitter = new EventEmitter();
// One listener an open page.
emitter.setMaxListeners(0);

/** Tells watchers in this process that a person's notices have changed. Whoever is told reads by the one connection to
 *  the database, and so after the transaction that it was called in. */
export const noticeEvents = {
  changed(userId: string): void {
    emitter.emit(userId);
  },
  /** @returns a function that ends the watch. */
  watch(userId: string, listener: () => void): () => void {
    emitter.on(userId, listener);
    return () => emitter.off(userId, listener);
  },
};
