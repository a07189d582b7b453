import path from 'node:path'
import type { Config } from '../config'
import type { Storage } from '../context'
import { DiskStorage } from './disk'
import { S3Storage } from './s3'

/** Object storage when a bucket is named, else a folder beside the database. */
export async function openStorage(config: Pick<Config, 'dataDirectory' | 's3'>, now: Date): Promise<Storage> {
  if (config.s3 !== undefined) return new S3Storage(config.s3)
  const disk = new DiskStorage(path.join(config.dataDirectory, 'attachments'))
  await disk.tidy(now)
  return disk
}
