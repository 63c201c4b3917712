/** happy-dom lays nothing out: elements get a size here, so that lists which draw only what is in view draw something.
 *  Returns what takes it back. */
export function giveElementsSize(widthPx: number, heightPx: number): () => void {
  const undo = [give('clientWidth', widthPx), give('clientHeight', heightPx)];
  return () => {
    for (const take of undo) take();
  };
}

function give(name: 'clientWidth' | 'clientHeight', valuePx: number): () => void {
  let holder: object = document.createElement('div');
  while (!Object.hasOwn(holder, name)) holder = Object.getPrototypeOf(holder);
  const before = Object.getOwnPropertyDescriptor(holder, name)!;
  Object.defineProperty(holder, name, { configurable: true, get: () => valuePx });
  return () => Object.defineProperty(holder, name, before);
}
