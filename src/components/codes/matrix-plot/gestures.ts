/** What a hand on the mouse, the screen or the keyboard asks of the plot; lengths in device pixels. */
export interface GestureTarget {
  pan(dx: number, dy: number): void;
  zoom(factor: number, px: number, py: number): boolean;
  whole(): void;
  point(at: { px: number; py: number } | null): void;
  size(): { width: number; height: number };
}

const WHEEL_STEP = 0.0016;
const KEY_ZOOM = 1.5;

/** Listens on the element until the returned function is called. */
export function listenForGestures(element: HTMLElement, target: GestureTarget): () => void {
  const held = new Map<number, { px: number; py: number }>();
  const place = (event: MouseEvent) => {
    const box = element.getBoundingClientRect();
    const ratio = target.size().width / Math.max(1, box.width);
    return { px: (event.clientX - box.left) * ratio, py: (event.clientY - box.top) * ratio };
  };

  const down = (event: PointerEvent) => {
    if (event.button !== 0) return;
    element.setPointerCapture(event.pointerId);
    held.set(event.pointerId, place(event));
  };
  const move = (event: PointerEvent) => {
    const at = place(event);
    const before = held.get(event.pointerId);
    if (before) {
      const other = [...held].find(([id]) => id !== event.pointerId)?.[1];
      if (other) pinch(target, before, at, other);
      else target.pan(at.px - before.px, at.py - before.py);
      held.set(event.pointerId, at);
    }
    target.point(at);
  };
  const up = (event: PointerEvent) => void held.delete(event.pointerId);
  const leave = () => {
    if (held.size === 0) target.point(null);
  };
  const wheel = (event: WheelEvent) => {
    const { px, py } = place(event);
    const lines = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
    // At either end of the zoom the wheel is left to the page.
    if (target.zoom(Math.exp(-event.deltaY * lines * WHEEL_STEP), px, py)) event.preventDefault();
  };
  const double = (event: MouseEvent) => {
    const { px, py } = place(event);
    target.zoom(4, px, py);
  };
  const key = (event: KeyboardEvent) => {
    if (!event.ctrlKey && !event.metaKey && !event.altKey && answerKey(event.key, event.shiftKey, target))
      event.preventDefault();
  };

  element.addEventListener('pointerdown', down);
  element.addEventListener('pointermove', move);
  element.addEventListener('pointerup', up);
  element.addEventListener('pointercancel', up);
  element.addEventListener('pointerleave', leave);
  element.addEventListener('wheel', wheel, { passive: false });
  element.addEventListener('dblclick', double);
  element.addEventListener('keydown', key);
  return () => {
    element.removeEventListener('pointerdown', down);
    element.removeEventListener('pointermove', move);
    element.removeEventListener('pointerup', up);
    element.removeEventListener('pointercancel', up);
    element.removeEventListener('pointerleave', leave);
    element.removeEventListener('wheel', wheel);
    element.removeEventListener('dblclick', double);
    element.removeEventListener('keydown', key);
  };
}

type At = { px: number; py: number };

function pinch(target: GestureTarget, before: At, at: At, other: At): void {
  const spread = (a: At) => Math.max(8, Math.hypot(a.px - other.px, a.py - other.py));
  const middle = { px: (at.px + other.px) / 2, py: (at.py + other.py) / 2 };
  target.pan((at.px - before.px) / 2, (at.py - before.py) / 2);
  target.zoom(spread(at) / spread(before), middle.px, middle.py);
}

function answerKey(key: string, fine: boolean, target: GestureTarget): boolean {
  const { width, height } = target.size();
  const step = (fine ? 0.02 : 0.15) * Math.min(width, height);
  const centre: [number, number] = [width / 2, height / 2];
  if (key === 'ArrowLeft') target.pan(step, 0);
  else if (key === 'ArrowRight') target.pan(-step, 0);
  else if (key === 'ArrowUp') target.pan(0, step);
  else if (key === 'ArrowDown') target.pan(0, -step);
  else if (key === '+' || key === '=') target.zoom(KEY_ZOOM, ...centre);
  else if (key === '-' || key === '_') target.zoom(1 / KEY_ZOOM, ...centre);
  else if (key === '0' || key === 'Home') target.whole();
  else return false;
  target.point({ px: centre[0], py: centre[1] });
  return true;
}
