import { useEffect } from 'react';

const size = 32;

/** Shows in the tab's icon how much of a run is done: a bar that fills; null gives the page's own icon back. */
export function useProgressIcon(fraction: number | null): void {
  // In steps of a sixteenth, which is what a tab's icon can show.
  const step = fraction === null ? null : Math.floor(fraction * 16);
  useEffect(() => {
    if (step === null) return;
    const link = document.querySelector<HTMLLinkElement>('link[rel="icon"]');
    const drawn = link && drawIcon(step / 16);
    if (!drawn) return;
    const own = { href: link.href, type: link.type };
    Object.assign(link, { href: drawn, type: 'image/png' });
    return () => {
      Object.assign(link, own);
    };
  }, [step]);
}

function drawIcon(fraction: number): string | null {
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = size;
  const pen = canvas.getContext('2d');
  if (!pen) return null;
  const style = getComputedStyle(document.documentElement);
  pen.fillStyle = style.getPropertyValue('--sheet') || '#fff';
  pen.fillRect(0, 0, size, size);
  pen.fillStyle = style.getPropertyValue('--act') || '#b33';
  pen.fillRect(0, size * (1 - fraction), size, size * fraction);
  pen.strokeStyle = style.getPropertyValue('--ink') || '#000';
  pen.lineWidth = 3;
  pen.strokeRect(1.5, 1.5, size - 3, size - 3);
  return canvas.toDataURL('image/png');
}
