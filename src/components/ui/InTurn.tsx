import { type ReactNode, startTransition, useEffect, useState } from 'react';

interface Props {
  /** How many parts before this one are mounted first. */
  turn: number;
  /** Height to keep free until then, so that nothing jumps. */
  className?: string;
  children: ReactNode;
}

/** Mounts a part in a task of its own, after those before it have been painted: several drawings that each take a few
 *  milliseconds would otherwise add up to one long task in which the page answers nothing. */
export function InTurn({ turn, className, children }: Props) {
  const [waiting, setWaiting] = useState(turn);
  useEffect(() => {
    if (waiting === 0) return;
    const frame = requestAnimationFrame(() => {
      // A task after this frame's paint.
      timer = setTimeout(() => startTransition(() => setWaiting(waiting - 1)));
    });
    let timer: ReturnType<typeof setTimeout> | undefined;
    return () => {
      cancelAnimationFrame(frame);
      clearTimeout(timer);
    };
  }, [waiting]);
  return waiting === 0 ? children : <div className={className} aria-hidden="true" />;
}
