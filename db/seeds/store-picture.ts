import { createHash } from 'node:crypto';
import { PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { environment } from '@/lib/server/environment';

/** Puts a picture where the job that checks photographs would have put it: under the digest of its bytes. */
export async function storePicture(bytes: Buffer): Promise<{ sha256: string; key: string; bytes: number }> {
  const { S3_ENDPOINT, S3_REGION, S3_BUCKET, S3_ACCESS_KEY, S3_SECRET_KEY } = environment();
  const client = new S3Client({
    endpoint: S3_ENDPOINT,
    region: S3_REGION,
    forcePathStyle: true,
    credentials: { accessKeyId: S3_ACCESS_KEY, secretAccessKey: S3_SECRET_KEY },
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const key = `photos/${sha256}`;
  await client.send(
    new PutObjectCommand({ Bucket: S3_BUCKET, Key: key, Body: bytes, ContentType: 'image/jpeg' }),
  );
  client.destroy();
  return { sha256, key, bytes: bytes.length };
}
