import { GetObjectCommand, PutObjectCommand, S3Client, S3ServiceException } from '@aws-sdk/client-s3';
import type { S3Settings } from '../config.ts';
import { Refusal } from '../refusal.ts';
import { type FileStorage, pathOf } from './file-storage.ts';

/** Files as objects of an S3-compatible store. The store is told each file's SHA-256, which is its name, and refuses
 *  bytes that arrive otherwise. */
export function s3Storage({ endpoint, bucket, prefix, region, accessKeyId, secretAccessKey }: S3Settings): FileStorage {
  const client = new S3Client({
    region,
    ...(endpoint && { endpoint, forcePathStyle: true }),
    credentials: { accessKeyId, secretAccessKey },
    maxAttempts: 3,
    // Not every compatible store knows the newer checksums; ours is the SHA-256 that we give.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  const keyOf = (sha256: string) => `${prefix}${pathOf(sha256)}`;
  return {
    async put(sha256, bytes) {
      const ChecksumSHA256 = Buffer.from(sha256, 'hex').toString('base64');
      const object = { Bucket: bucket, Key: keyOf(sha256), Body: bytes, ContentLength: bytes.length, ChecksumSHA256 };
      await client.send(new PutObjectCommand(object)).catch((error) => {
        throw unreached(error);
      });
    },

    async open(sha256, range) {
      const Range = range && `bytes=${range.from}-${range.to}`;
      const object = { Bucket: bucket, Key: keyOf(sha256), Range };
      try {
        const { Body } = await client.send(new GetObjectCommand(object));
        return Body?.transformToWebStream() as ReadableStream<Uint8Array> | undefined;
      } catch (error) {
        if (error instanceof S3ServiceException && error.$metadata.httpStatusCode === 404) return undefined;
        throw unreached(error);
      }
    },
  };
}

function unreached(error: unknown): Refusal {
  console.error('The file store:', error);
  return new Refusal(
    'storage',
    'The file store cannot be reached or refuses. Nothing was released; try again shortly.',
  );
}
