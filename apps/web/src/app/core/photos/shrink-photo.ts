/** Long enough to read a rating plate by; a phone's own are four times as large. */
const longestSide = 1_600;
const quality = 0.82;

/**
 * A photo small enough to send on a weak signal, and without what a phone writes into it. One that
 * the browser cannot draw is sent as it is: the server decides.
 */
export async function shrinkPhoto(file: File): Promise<Blob> {
  try {
    const picture = await createImageBitmap(file, { imageOrientation: 'from-image' });
    const { width, height } = fitted(picture.width, picture.height, longestSide);
    const canvas = document.createElement('canvas');
    canvas.width = width;
    canvas.height = height;
    canvas.getContext('2d')?.drawImage(picture, 0, 0, width, height);
    picture.close();
    const blob = await new Promise<Blob | null>((resolve) =>
      canvas.toBlob(resolve, 'image/jpeg', quality),
    );
    return blob ?? file;
  } catch {
    return file;
  }
}

/** The size with its longest side brought down to `longest`; never made larger. */
export function fitted(
  width: number,
  height: number,
  longest: number,
): { width: number; height: number } {
  const scale = Math.min(1, longest / Math.max(width, height));
  return {
    width: Math.max(1, Math.round(width * scale)),
    height: Math.max(1, Math.round(height * scale)),
  };
}
