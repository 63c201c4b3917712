import type { KeyboardEvent } from 'react';
import type { CurveMarks } from './marks.ts';
import { type Choice, walk } from './walk.ts';

interface Keys {
  curves: readonly CurveMarks[];
  choice: Choice | null;
  onChoose: (choice: Choice) => void;
  onClear: () => void;
  onMagnify: (factor: number) => void;
  onWhole: () => void;
}

export const ZOOM_STEP = 1.6;

/** The chart by keyboard: arrows, Home and End walk the points, + and − zoom, 0 shows all, Escape lets go. */
export const chartKeyHandler = (keys: Keys) => (event: KeyboardEvent) => {
  if (event.ctrlKey || event.metaKey || event.altKey) return;
  const act = actionOf(event.key, keys);
  if (act === null) return;
  event.preventDefault();
  act();
};

function actionOf(key: string, keys: Keys): (() => void) | null {
  switch (key) {
    case '+':
    case '=':
      return () => keys.onMagnify(ZOOM_STEP);
    case '-':
      return () => keys.onMagnify(1 / ZOOM_STEP);
    case '0':
      return keys.onWhole;
    case 'Escape':
      return keys.onClear;
    default: {
      const next = walk(keys.curves, keys.choice, key);
      return next && (() => keys.onChoose(next));
    }
  }
}
