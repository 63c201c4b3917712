import { type ReactNode, useId } from 'react';

interface Props {
  children: ReactNode;
  /** Formula or definition, and its published source. */
  meaning: ReactNode;
}

/** A trade word with its formula and source, shown on hover and on keyboard focus. */
export function Term({ children, meaning }: Props) {
  const id = useId();
  return (
    <span className="group relative inline-block">
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: the explanation must open by keyboard as well as by pointer */}
      <span tabIndex={0} aria-describedby={id} className="cursor-help underline decoration-dotted underline-offset-4">
        {children}
      </span>
      <span
        role="tooltip"
        id={id}
        className="invisible absolute top-full left-0 z-20 mt-1 block w-64 max-w-[80vw] border border-ink bg-sheet px-2.5 py-1.5 font-normal font-sans text-ink text-tiny opacity-0 group-focus-within:visible group-focus-within:opacity-100 group-hover:visible group-hover:opacity-100"
      >
        {meaning}
      </span>
    </span>
  );
}
