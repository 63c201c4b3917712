import { EventEmitter } from 'node:events';

const emitter = new EventEmitter();
// One listener a watching browser tab.
emitter.setMaxListeners(0);

/** Tells watchers in this process that a commit has changed a run. */
export const runEvents = {
  changed(runId: string): void {
    emitter.emit(runId);
  },
  /** @returns a function that ends the watch. */
  watch(runId: string, listener: () => void): () => void {
    emitter.on(runId, listener);
    return () => emitter.off(runId, listener);
  },
};
