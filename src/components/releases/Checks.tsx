interface Props<Id extends string> {
  legend: string;
  choices: readonly { id: Id; title: string }[];
  chosen: readonly Id[];
  error?: string | undefined;
  onChange: (chosen: Id[]) => void;
}

/** Several choices of a few: boxes to tick, in the order of the list whatever the order of ticking. */
export function Checks<Id extends string>({ legend, choices, chosen, error, onChange }: Props<Id>) {
  const toggle = (id: Id, isOn: boolean) =>
    onChange(choices.map((choice) => choice.id).filter((one) => (one === id ? isOn : chosen.includes(one))));
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1.5 font-semibold">{legend}</legend>
      <div className="grid gap-x-6 gap-y-1 sm:grid-cols-2 lg:grid-cols-3">
        {choices.map(({ id, title }) => (
          <label key={id} className="flex min-h-7 cursor-pointer items-baseline gap-2">
            <input
              type="checkbox"
              className="accent-act"
              checked={chosen.includes(id)}
              onChange={(event) => toggle(id, event.target.checked)}
            />
            <span>{title}</span>
          </label>
        ))}
      </div>
      {error && (
        <p className="mt-1 text-fail text-tiny">
          <span className="font-semibold">Not accepted:</span> {error}
        </p>
      )}
    </fieldset>
  );
}
