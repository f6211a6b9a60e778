import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  NotFound,
  NoSuchKey,
  PutObjectCommand,
  S3Client,
} from "@aws-sdk/client-s3";
import { env } from "../env";

/** Files that people hand in, kept in an S3-compatible store under keys of ours. */

let client: S3Client | undefined;

function s3(): S3Client {
  const settings = env();
  client ??= new S3Client({
    endpoint: settings.S3_ENDPOINT,
    region: settings.S3_REGION,
    credentials: {
      accessKeyId: settings.S3_ACCESS_KEY_ID,
      secretAccessKey: settings.S3_SECRET_ACCESS_KEY,
    },
    forcePathStyle: true,
    // Trailing checksums make a chunked body that many S3-compatible stores do not understand.
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
  return client;
}

/** What the store knows of an object without reading it. */
export interface StoredObject {
  sizeBytes: number;
  contentType: string;
}

/** Store bytes under a key, replacing what was there. */
export async function putObject(key: string, body: Uint8Array, contentType: string): Promise<void> {
  await s3().send(
    new PutObjectCommand({
      Bucket: env().S3_BUCKET,
      Key: key,
      Body: body,
      ContentType: contentType,
      ContentLength: body.byteLength,
    }),
  );
}

/** An object's bytes and description, or null when there is none under that key. */
export async function findObject(
  key: string,
): Promise<(StoredObject & { body: Uint8Array }) | null> {
  try {
    const found = await s3().send(new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
    const body = (await found.Body?.transformToByteArray()) ?? new Uint8Array();
    return {
      body,
      sizeBytes: body.byteLength,
      contentType: found.ContentType ?? "application/octet-stream",
    };
  } catch (error) {
    if (error instanceof NoSuchKey || error instanceof NotFound) return null;
    throw error;
  }
}

/** An object's description, or null when there is none under that key. */
export async function describeObject(key: string): Promise<StoredObject | null> {
  try {
    const found = await s3().send(new HeadObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
    return {
      sizeBytes: found.ContentLength ?? 0,
      contentType: found.ContentType ?? "application/octet-stream",
    };
  } catch (error) {
    if (error instanceof NotFound || error instanceof NoSuchKey) return null;
    throw error;
  }
}

/** Remove an object; removing one that is not there is no error. */
export async function deleteObject(key: string): Promise<void> {
  await s3().send(new DeleteObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
}
