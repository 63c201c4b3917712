interface Props {
  label: string;
  /** 0 to 1, or null while the end is not known. */
  value: number | null;
  /** Under the bar: left "62 %, 1 min 40 s left", right "8.1 M frames/s". */
  left?: string;
  right?: string;
}

export function Progress({ label, value, left, right }: Props) {
  const percent = value === null ? null : Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent ?? undefined}
        aria-valuetext={left}
        className="h-1.5 overflow-hidden bg-hair"
      >
        <div
          className={percent === null ? 'h-full w-1/4 animate-pulse bg-act' : 'h-full bg-act'}
          style={percent === null ? undefined : { width: `${percent}%` }}
        />
      </div>
      {(left || right) && (
        <p className="mt-1 flex justify-between gap-3 text-quiet text-tiny">
          <span>{left}</span>
          <span>{right}</span>
        </p>
      )}
    </div>
  );
}
