/** What measured error rates do and do not say. */
export function Caution() {
  return (
    <p className="text-quiet text-tiny">
      Rates hold for the channel model and the decoder stated, not for a device. Nothing is claimed to the right of the
      last point: an error floor can lie beneath what was measured. Where safety or stored data depend on it, the
      product's own qualification and the responsible engineer decide.
    </p>
  );
}
