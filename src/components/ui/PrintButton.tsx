import { Button } from './Button.tsx';

/** Opens the browser's own dialogue, which also makes a PDF. */
export default function PrintButton({ label = 'Print' }: { label?: string }) {
  return <Button onClick={() => window.print()}>{label}</Button>;
}
