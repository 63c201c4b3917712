/** Pixels a unit of the drawing: enough for print at the size it has on the screen. */
const SCALE = 3;

/** A drawing as PNG. @throws Error when the browser cannot draw it. */
export async function rasterise(svg: string): Promise<Blob> {
  const url = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = url;
    await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = image.naturalWidth * SCALE;
    canvas.height = image.naturalHeight * SCALE;
    canvas.getContext('2d')!.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await new Promise((resolve, reject) => {
      canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('The drawing could not be turned into PNG.'))));
    });
  } finally {
    URL.revokeObjectURL(url);
  }
}
