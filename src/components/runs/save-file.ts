/** Offers a file to keep. */
export function saveFile(name: string, type: string, content: string | Blob): void {
  const url = URL.createObjectURL(new Blob([content], { type }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The download has taken its copy by the next turn of the page's loop.
  setTimeout(() => URL.revokeObjectURL(url), 0);
}

/** A name that every file system takes. */
export const fileStem = (name: string): string =>
  name
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replaceAll(/^-+|-+$/g, '')
    .slice(0, 60) || 'points';
