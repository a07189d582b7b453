import { fileURLToPath } from 'node:url'
import path from 'node:path'
import { z } from 'zod'

export const projectRoot = fileURLToPath(new URL('..', import.meta.url))

const environment = z.object({
  NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
  PORT: z.coerce.number('PORT must be a number.').int().min(0).max(65535).default(4280),
  HOST: z.string().min(1).default('127.0.0.1'),
  DATABASE_URL: z
    .string()
    .regex(/^(mariadb|mysql):\/\//, 'DATABASE_URL must begin with mariadb:// or mysql://.')
    .optional(),
  DATA_DIR: z.string().min(1).default('.data'),
  SECRETS_DIR: z.string().min(1).optional(),
  PUBLIC_URL: z.url('PUBLIC_URL must be a whole address, such as https://press.example.').optional(),
  TLS_CERT: z.string().min(1).optional(),
  TLS_KEY: z.string().min(1).optional(),
  S3_BUCKET: z.string().min(3).optional(),
  S3_ENDPOINT: z.url('S3_ENDPOINT must be a whole address, such as https://objects.example.').optional(),
  S3_REGION: z.string().min(1).default('us-east-1'),
  S3_PREFIX: z
    .string()
    .regex(/^[\w.-]+(\/[\w.-]+)*\/?$/, 'S3_PREFIX is a path of plain names, such as quarterload/.')
    .optional(),
  SMTP_URL: z
    .string()
    .regex(/^smtps?:\/\//, 'SMTP_URL must begin with smtp:// or smtps://.')
    .optional(),
  MAIL_FROM: z
    .string()
    .regex(/^[^\r\n]*[^\s@<]+@[^\s@>]+>?$/, 'MAIL_FROM is an address, such as Quarterload <press@shop.example>.')
    .optional(),
  MAIL_LEASE_SECONDS: z.coerce.number('MAIL_LEASE_SECONDS is a number of seconds.').int().min(1).max(3600).default(120),
  BCRYPT_COST: z.coerce.number().int().min(4).max(12, 'BCRYPT_COST must be between 4 and 12.').default(11),
  TRUST_PROXY: z.coerce.number('TRUST_PROXY is the number of proxies in front.').int().min(0).max(8).default(0),
  RELAXED_DURABILITY: z.enum(['0', '1']).default('0'),
  LOG_LEVEL: z.enum(['silent', 'fatal', 'error', 'warn', 'info', 'debug']).default('warn'),
})

export interface Config {
  environment: 'production' | 'development' | 'test'
  port: number
  host: string
  /** An outside MariaDB; without it the embedded one is used. */
  databaseUrl: string | undefined
  dataDirectory: string
  /** Outside the database, and shared by all app servers when there are several. */
  secretsDirectory: string
  /** The address that people use, when a proxy stands in front. */
  publicUrl: string | undefined
  /** Files of a certificate with its chain and of its key, in PEM: the server then speaks https itself. */
  tls: { certificateFile: string; keyFile: string } | undefined
  /** Whether people's browsers come by https, to the server itself or to a proxy in front of it. */
  isHttps: boolean
  /** Object storage for photos and documents; without it they are kept in a folder beside the data. */
  s3: { bucket: string; endpoint: string | undefined; region: string; prefix: string } | undefined
  /** A mail server; without it letters lie in the tray that the owner reads. */
  mail: { url: string; from: string } | undefined
  /** For so long a letter belongs to the server that is sending it. */
  mailLeaseMilliseconds: number
  bcryptCost: number
  trustProxy: number
  /** In tests only: a database that may lose its last second is taken as it is. */
  relaxedDurability: boolean
  logLevel: string
}

function tlsOf({ TLS_CERT, TLS_KEY }: z.infer<typeof environment>): Config['tls'] {
  if (TLS_CERT === undefined && TLS_KEY === undefined) return undefined
  if (TLS_CERT === undefined || TLS_KEY === undefined) throw new Error('TLS_CERT and TLS_KEY go together: set both, or none.')
  return { certificateFile: path.resolve(projectRoot, TLS_CERT), keyFile: path.resolve(projectRoot, TLS_KEY) }
}

function mailOf({ SMTP_URL, MAIL_FROM }: z.infer<typeof environment>): Config['mail'] {
  if (SMTP_URL === undefined) return undefined
  if (MAIL_FROM === undefined) throw new Error('SMTP_URL needs MAIL_FROM: the address that letters come from.')
  return { url: SMTP_URL, from: MAIL_FROM }
}

/** Empty variables count as unset: `DATABASE_URL= npm start` means the embedded database. */
export function readConfig(variables: NodeJS.ProcessEnv): Config {
  const given = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== ''))
  const parsed = environment.safeParse(given)
  if (!parsed.success) {
    throw new Error(parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`).join('\n'))
  }
  const values = parsed.data
  const dataDirectory = path.resolve(projectRoot, values.DATA_DIR)
  const tls = tlsOf(values)
  return {
    environment: values.NODE_ENV,
    port: values.PORT,
    host: values.HOST,
    databaseUrl: values.DATABASE_URL,
    dataDirectory,
    secretsDirectory:
      values.SECRETS_DIR === undefined ? path.join(dataDirectory, 'secrets') : path.resolve(projectRoot, values.SECRETS_DIR),
    publicUrl: values.PUBLIC_URL?.replace(/\/+$/, ''),
    tls,
    isHttps: values.PUBLIC_URL === undefined ? tls !== undefined : values.PUBLIC_URL.startsWith('https:'),
    s3:
      values.S3_BUCKET === undefined
        ? undefined
        : {
            bucket: values.S3_BUCKET,
            endpoint: values.S3_ENDPOINT,
            region: values.S3_REGION,
            prefix: values.S3_PREFIX?.replace(/\/?$/, '/') ?? '',
          },
    mail: mailOf(values),
    mailLeaseMilliseconds: values.MAIL_LEASE_SECONDS * 1000,
    bcryptCost: values.BCRYPT_COST,
    trustProxy: values.TRUST_PROXY,
    relaxedDurability: values.NODE_ENV === 'test' && values.RELAXED_DURABILITY === '1',
    logLevel: values.LOG_LEVEL,
  }
}
