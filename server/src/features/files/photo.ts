import { fromBuffer } from 'file-type';
import sharp from 'sharp';
import { invalid } from '../../core/problems/problem';

const kinds = { 'image/jpeg': 'jpeg', 'image/png': 'png', 'image/webp': 'webp' } as const;

/** Wide enough to read a rating plate by; phones take photos four times as large. */
const longestSide = 2400;
const smallSide = 320;
/** A file that unpacks to more would fill the memory. */
const mostPixels = 52_000_000;

export interface Photo {
  contentType: string;
  full: Buffer;
  small: Buffer;
}

/**
 * Takes a picture by what it holds, not by what it is called, and draws it anew: what is kept
 * carries no place, no camera and nothing hidden behind the pixels.
 */
export async function readPhoto(content: Buffer): Promise<Photo> {
  const type = (await fromBuffer(content))?.mime;
  if (type === undefined || !(type in kinds)) throw notAPhoto('is not a JPEG, PNG or WebP picture');
  const contentType = type as keyof typeof kinds;
  try {
    const upright = sharp(content, { limitInputPixels: mostPixels, failOn: 'error' }).rotate();
    const within = (side: number) =>
      upright.clone().resize(side, side, { fit: 'inside', withoutEnlargement: true });
    return {
      contentType,
      full: await within(longestSide).toFormat(kinds[contentType], { quality: 82 }).toBuffer(),
      small: await within(smallSide).webp({ quality: 70 }).toBuffer(),
    };
  } catch {
    throw notAPhoto('cannot be read as a picture, or is too large');
  }
}

function notAPhoto(detail: string) {
  return invalid([{ pointer: '/file', detail }]);
}
