/** The part of s3rver, a local stand-in for object storage, that the tests use; the package brings no types. */
declare module 's3rver' {
  import type { AddressInfo } from 'node:net'
  export default class S3rver {
    constructor(options: {
      address: string
      port: number
      silent: boolean
      directory: string
      configureBuckets: { name: string; configs: never[] }[]
    })
    run(): Promise<AddressInfo>
    close(): Promise<void>
  }
}
