import {
  GetObjectCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  NoSuchKey,
  NotFound,
  PutObjectCommand,
  S3Client,
  type ListObjectsV2CommandOutput,
} from '@aws-sdk/client-s3'
import type { Storage, StoredFile } from '../context'
import { checkKey, inKeyOrder } from './keys'

export interface S3Place {
  bucket: string
  /** An address of object storage other than Amazon's. */
  endpoint: string | undefined
  region: string
  /** Put before every key: several installations may share one bucket. */
  prefix: string
}

/** Objects of an S3 bucket. Credentials come by the SDK's usual chain: environment, profile, or the machine's role. */
export class S3Storage implements Storage {
  private readonly client: S3Client

  constructor(private readonly place: S3Place) {
    const { endpoint, region } = place
    this.client = new S3Client({
      region,
      ...(endpoint === undefined ? {} : { endpoint, forcePathStyle: true }),
      // Object storage that isn't Amazon's often knows no trailing checksums; the SHA-256 is ours and is in the key.
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
    })
  }

  async put(key: string, bytes: Buffer): Promise<void> {
    await this.client.send(new PutObjectCommand({ ...this.objectOf(key), Body: bytes, ContentLength: bytes.length }))
  }

  async get(key: string): Promise<Buffer | null> {
    try {
      const { Body } = await this.client.send(new GetObjectCommand(this.objectOf(key)))
      return Body === undefined ? null : Buffer.from(await Body.transformToByteArray())
    } catch (error) {
      if (error instanceof NoSuchKey) return null
      throw error
    }
  }

  async has(key: string): Promise<boolean> {
    try {
      await this.client.send(new HeadObjectCommand(this.objectOf(key)))
      return true
    } catch (error) {
      if (error instanceof NotFound || error instanceof NoSuchKey) return false
      throw error
    }
  }

  async list(prefix = ''): Promise<StoredFile[]> {
    const { bucket, prefix: before } = this.place
    const files: StoredFile[] = []
    let after: string | undefined
    do {
      const page: ListObjectsV2CommandOutput = await this.client.send(
        new ListObjectsV2Command({ Bucket: bucket, Prefix: `${before}${prefix}`, ContinuationToken: after }),
      )
      for (const { Key, Size } of page.Contents ?? []) {
        if (Key !== undefined) files.push({ key: Key.slice(before.length), size: Size ?? 0 })
      }
      after = page.IsTruncated === true ? page.NextContinuationToken : undefined
    } while (after !== undefined)
    return inKeyOrder(files)
  }

  private objectOf(key: string): { Bucket: string; Key: string } {
    return { Bucket: this.place.bucket, Key: `${this.place.prefix}${checkKey(key)}` }
  }
}
