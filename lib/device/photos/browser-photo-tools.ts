import type { PhotoTools } from './prepare-photo';

/** Longest side in pixels and the quality that still show a rib, a tie and a tape's marks. */
const LONGEST_SIDE = 2048;
const QUALITY = 0.82;

/** The browser's own decoder, and a compression that runs in a worker from our own origin. */
export const browserPhotoTools: PhotoTools = {
  async sizeOf(file) {
    const picture = await createImageBitmap(file);
    const { width, height } = picture;
    picture.close();
    return { width, height };
  },
  async compress(file) {
    // Only a photo needs it: it stays out of the script that the shell starts with.
    const { default: imageCompression } = await import('browser-image-compression');
    const named = file instanceof File ? file : new File([file], 'photo', { type: file.type });
    return imageCompression(named, {
      maxWidthOrHeight: LONGEST_SIDE,
      initialQuality: QUALITY,
      maxSizeMB: 2,
      fileType: 'image/jpeg',
      useWebWorker: true,
      libURL: new URL('/vendor/browser-image-compression.js', location.origin).href,
    });
  },
  digest: (bytes) => crypto.subtle.digest('SHA-256', bytes),
};
