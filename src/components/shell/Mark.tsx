import { type Lattice, planeOfOrder3 } from './lattice.ts';

interface Props {
  lattice?: Lattice;
  className?: string;
}

const dot = (x: number, y: number, r: number) =>
  `M${x + 0.5 - r} ${y + 0.5}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0`;

/** The mark: which points lie on which lines of a small plane. Faint dots are pairs that do not meet. */
export function Mark({ lattice = planeOfOrder3, className }: Props) {
  const { size, cells } = lattice;
  const all = Array.from({ length: size * size }, (_, i) => dot(i % size, Math.floor(i / size), 0.12)).join('');
  return (
    <svg viewBox={`0 0 ${size} ${size}`} className={className} aria-hidden="true" focusable="false">
      <path d={all} fill="currentColor" opacity="0.45" />
      <path d={cells.map(([x, y]) => dot(x, y, 0.42)).join('')} fill="currentColor" />
    </svg>
  );
}
