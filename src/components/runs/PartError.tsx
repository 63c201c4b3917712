/** What a part of the form would accept, where no single control can say it; takes the focus when it is the first. */
export function PartError({ text }: { text: string | undefined }) {
  if (!text) return null;
  return (
    <p className="mt-1 text-fail text-tiny" tabIndex={-1} data-error>
      <span className="font-semibold">Not accepted:</span> {text}
    </p>
  );
}
