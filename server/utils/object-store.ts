import { createHash } from 'node:crypto'
import { GetObjectCommand, HeadBucketCommand, HeadObjectCommand, NotFound, PutObjectCommand, S3Client } from '@aws-sdk/client-s3'
import { config } from './config'

/** Storage holds other bytes than were given to it. */
export class ObjectStoreError extends Error {
  override name = 'ObjectStoreError'
}

/** Files by their content: a file's key is its SHA-256, so the same file is stored once and a changed one shows. */
export interface ObjectStore {
  /** Stores a file and reads it back. @returns its key @throws ObjectStoreError when other bytes came back */
  put(bytes: Uint8Array, contentType?: string): Promise<string>
  /** @throws ObjectStoreError when the stored bytes no longer match the key */
  get(key: string): Promise<Uint8Array>
  exists(key: string): Promise<boolean>
  /** Whether storage answers and knows our bucket. */
  isReady(): Promise<boolean>
}

export const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex')

/** @param client talks to the storage @param bucket that holds everything */
export function objectStore(client: S3Client, bucket: string): ObjectStore {
  const exists = async (key: string) => isFound(client.send(new HeadObjectCommand({ Bucket: bucket, Key: key })))

  const get = async (key: string) => {
    const { Body: body } = await client.send(new GetObjectCommand({ Bucket: bucket, Key: key }))
    const bytes = await body?.transformToByteArray() ?? new Uint8Array()
    if (sha256(bytes) !== key) throw new ObjectStoreError(`storage holds other bytes under ${key} than were put there`)
    return bytes
  }

  const put = async (bytes: Uint8Array, contentType = 'application/octet-stream') => {
    const key = sha256(bytes)
    if (await exists(key)) return key
    await client.send(new PutObjectCommand({ Bucket: bucket, Key: key, Body: bytes, ContentType: contentType }))
    await get(key)
    return key
  }

  const isReady = () => isFound(client.send(new HeadBucketCommand({ Bucket: bucket }))).catch(() => false)

  return { put, get, exists, isReady }
}

async function isFound(answer: Promise<unknown>): Promise<boolean> {
  try {
    await answer
    return true
  }
  catch (error) {
    if (error instanceof NotFound) return false
    throw error
  }
}

let configured: ObjectStore | undefined

/** The storage that this process's settings name. */
export function objects(): ObjectStore {
  if (configured) return configured
  const { S3_ENDPOINT, S3_REGION, S3_BUCKET, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = config()
  const client = new S3Client({
    endpoint: S3_ENDPOINT,
    region: S3_REGION,
    credentials: { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY },
    forcePathStyle: true,
    // Storage that does not know checksum trailers keeps their framing as part of the file.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  })
  configured = objectStore(client, S3_BUCKET)
  return configured
}
