import { Readable } from 'node:stream';
import { DeleteObjectCommand, GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { environment } from './environment';

/** How long an address for putting or getting an object works. */
const PUT_SECONDS = 15 * 60;
const GET_SECONDS = 5 * 60;

let client: S3Client | null = null;

function storage(): S3Client {
  const { S3_ENDPOINT, S3_REGION, S3_ACCESS_KEY, S3_SECRET_KEY } = environment();
  client ??= new S3Client({
    endpoint: S3_ENDPOINT,
    region: S3_REGION,
    forcePathStyle: true,
    credentials: { accessKeyId: S3_ACCESS_KEY, secretAccessKey: S3_SECRET_KEY },
    // The newer default wraps bodies in chunks with checksums, which not every store of this kind unwraps.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  return client;
}

const Bucket = () => environment().S3_BUCKET;

export interface UploadAddress {
  url: string;
  headers: Record<string, string>;
  expiresAt: string;
}

/** An address at which exactly this many bytes of exactly this type can be put, for a quarter of an hour. */
export async function uploadAddress(
  key: string,
  contentType: string,
  bytes: number,
  now: string,
): Promise<UploadAddress> {
  const command = new PutObjectCommand({
    Bucket: Bucket(),
    Key: key,
    ContentType: contentType,
    ContentLength: bytes,
  });
  const url = await getSignedUrl(storage(), command, {
    expiresIn: PUT_SECONDS,
    signableHeaders: new Set(['host', 'content-type', 'content-length']),
  });
  return {
    url,
    headers: { 'Content-Type': contentType },
    expiresAt: new Date(Date.parse(now) + PUT_SECONDS * 1000).toISOString(),
  };
}

/** A short-lived address for looking at an object. */
export function downloadAddress(key: string): Promise<string> {
  return getSignedUrl(storage(), new GetObjectCommand({ Bucket: Bucket(), Key: key }), {
    expiresIn: GET_SECONDS,
  });
}

/**
 * The bytes of an object, or null when there is none.
 * @param most bytes wanted: of a larger object the rest is left where it is, and what comes back is longer than this
 */
export async function readObject(key: string, most: number): Promise<Buffer | null> {
  try {
    const { Body: body } = await storage().send(new GetObjectCommand({ Bucket: Bucket(), Key: key }));
    if (!(body instanceof Readable)) throw new Error(`The object ${key} came without a body.`);
    const chunks: Buffer[] = [];
    let length = 0;
    for await (const chunk of body) {
      chunks.push(chunk as Buffer);
      length += (chunk as Buffer).length;
      if (length > most) break;
    }
    return Buffer.concat(chunks);
  } catch (error) {
    if (error instanceof Error && (error.name === 'NoSuchKey' || error.name === 'NotFound')) return null;
    throw error;
  }
}

export async function writeObject(key: string, body: Buffer, contentType: string): Promise<void> {
  await storage().send(
    new PutObjectCommand({ Bucket: Bucket(), Key: key, Body: body, ContentType: contentType }),
  );
}

export async function deleteObject(key: string): Promise<void> {
  await storage().send(new DeleteObjectCommand({ Bucket: Bucket(), Key: key }));
}
