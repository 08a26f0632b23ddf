import { resolve } from 'node:path';
import { z } from 'zod';

const Environment = z.object({
  NODE_ENV: z.string().optional(),
  PORT: z.coerce.number().int().min(0).max(65_535).default(4300),
  HOST: z.string().min(1).default('127.0.0.1'),
  DATABASE_URL: z.string().regex(/^postgres(ql)?:\/\//, 'must begin with postgres://'),
  SESSION_SECRET: z.string().min(32, 'needs at least 32 characters of chance'),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  /** How many proxies in front of the server may be believed about the caller's address. */
  TRUST_PROXY_HOPS: z.coerce.number().int().min(0).max(5).default(0),
  GOOGLE_CLIENT_ID: z.string().min(1).optional(),
  GOOGLE_CLIENT_SECRET: z.string().min(1).optional(),
  /** Development and tests alone: an identity server on this machine that stands in for Google's. */
  GOOGLE_STAND_IN_URL: z
    .string()
    .refine(isOnThisMachine, 'must be on this machine, such as http://127.0.0.1:4399')
    .optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  ENGINE_WORKERS: z.coerce.number().int().min(1).max(16).optional(),
  CLIENT_FOLDER: z.string().min(1).optional(),
});

/** What the process was told at its start; nothing reads the environment afterwards. */
export interface Config {
  readonly port: number;
  readonly host: string;
  readonly databaseUrl: string;
  readonly sessionSecret: string;
  /** Origin under which browsers reach the server, without a slash at its end; null for whatever host they name. */
  readonly publicUrl: string | null;
  readonly trustProxyHops: number;
  readonly google: GoogleSettings | null;
  readonly logLevel: z.infer<typeof Environment>['LOG_LEVEL'];
  /** How many levellings and forecasts run at once; null for one less than the processors, two at least. */
  readonly engineWorkers: number | null;
  /** The built client. */
  readonly clientFolder: string;
  readonly limits: RateLimits;
}

/** This server's registration with Google. */
export interface GoogleSettings {
  readonly clientId: string;
  readonly clientSecret: string;
  /** Origin of a server that stands in for Google's, on this machine; null for Google itself. */
  readonly standInUrl: string | null;
}

/** How much one caller may ask for. */
export interface RateLimits {
  /** Requests to the API from one address in a minute. */
  readonly requestsPerMinute: number;
  /** Failed sign-ins with one e-mail address from one address in a quarter of an hour. */
  readonly failedSignIns: number;
}

export const USUAL_LIMITS: RateLimits = { requestsPerMinute: 1200, failedSignIns: 10 };

/** Reads the environment, or throws one error that names everything wrong with it. Empty variables count as absent. */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const parsed = Environment.safeParse(given);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The configuration is not right. ${faults.join('; ')}`);
  }
  const env = parsed.data;
  if ((env.GOOGLE_CLIENT_ID === undefined) !== (env.GOOGLE_CLIENT_SECRET === undefined)) {
    throw new Error('The configuration is not right. GOOGLE_CLIENT_ID and GOOGLE_CLIENT_SECRET belong together.');
  }
  const publicUrl = env.PUBLIC_URL ? new URL(env.PUBLIC_URL).origin : null;
  if (env.GOOGLE_STAND_IN_URL !== undefined && publicUrl !== null && !isOnThisMachine(publicUrl)) {
    throw new Error(
      'The configuration is not right. GOOGLE_STAND_IN_URL is never used where others can reach the server.',
    );
  }
  return {
    port: env.PORT,
    host: env.HOST,
    databaseUrl: env.DATABASE_URL,
    sessionSecret: env.SESSION_SECRET,
    publicUrl,
    trustProxyHops: env.TRUST_PROXY_HOPS,
    google:
      env.GOOGLE_CLIENT_ID && env.GOOGLE_CLIENT_SECRET
        ? {
            clientId: env.GOOGLE_CLIENT_ID,
            clientSecret: env.GOOGLE_CLIENT_SECRET,
            standInUrl: env.GOOGLE_STAND_IN_URL ? new URL(env.GOOGLE_STAND_IN_URL).origin : null,
          }
        : null,
    logLevel: env.LOG_LEVEL,
    engineWorkers: env.ENGINE_WORKERS ?? null,
    clientFolder: resolve(env.CLIENT_FOLDER ?? 'dist/client/browser'),
    limits: USUAL_LIMITS,
  };
}

function isOnThisMachine(url: string): boolean {
  return URL.canParse(url) && ['127.0.0.1', 'localhost', '[::1]'].includes(new URL(url).hostname);
}
