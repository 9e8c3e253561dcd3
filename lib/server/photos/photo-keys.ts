/** Where bytes are put that nobody has looked at yet. */
export const incomingKey = (photoId: string): string => `incoming/${photoId}`;

/** Where checked bytes are kept, under their own digest: what is there never changes. */
export const storedKey = (sha256: string): string => `photos/${sha256}`;
