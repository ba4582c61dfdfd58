import { randomBytes } from 'node:crypto'
import { PutObjectCommand, S3Client } from '@aws-sdk/client-s3'
import { describe, expect, it } from 'vitest'
import { config } from '~~/server/utils/config'
import { ObjectStoreError, objectStore, objects, sha256 } from '~~/server/utils/object-store'

function clientWith(accessKeyId: string) {
  const { S3_ENDPOINT, S3_REGION, S3_SECRET_ACCESS_KEY } = config()
  return new S3Client({
    endpoint: S3_ENDPOINT, region: S3_REGION, forcePathStyle: true, maxAttempts: 1,
    credentials: { accessKeyId, secretAccessKey: S3_SECRET_ACCESS_KEY },
    requestChecksumCalculation: 'WHEN_REQUIRED', responseChecksumValidation: 'WHEN_REQUIRED',
  })
}

describe('the object store', () => {
  it.each([0, 1, 11, 300_000])('keeps a file of %i bytes under its hash, byte by byte', async (size) => {
    const bytes = randomBytes(size)
    const key = await objects().put(bytes)
    expect(key).toBe(sha256(bytes))
    expect(Buffer.from(await objects().get(key)).equals(bytes)).toBe(true)
  })

  it('gives the same key when the same file comes again', async () => {
    const bytes = randomBytes(100)
    expect(await objects().put(bytes)).toBe(await objects().put(bytes))
  })

  it('says which files it has', async () => {
    expect(await objects().exists(await objects().put(randomBytes(10)))).toBe(true)
    expect(await objects().exists(sha256(randomBytes(10)))).toBe(false)
  })

  it('refuses to hand out bytes that do not match their key', async () => {
    const { S3_BUCKET, S3_ACCESS_KEY_ID } = config()
    const key = sha256(randomBytes(10))
    await clientWith(S3_ACCESS_KEY_ID).send(new PutObjectCommand({ Bucket: S3_BUCKET, Key: key, Body: 'something else' }))
    await expect(objects().get(key)).rejects.toThrow(ObjectStoreError)
  })

  it('is ready only with the right bucket and key', async () => {
    const { S3_BUCKET, S3_ACCESS_KEY_ID } = config()
    expect(await objects().isReady()).toBe(true)
    expect(await objectStore(clientWith(S3_ACCESS_KEY_ID), 'no-such-bucket').isReady()).toBe(false)
    expect(await objectStore(clientWith('another-key'), S3_BUCKET).isReady()).toBe(false)
  })
})
