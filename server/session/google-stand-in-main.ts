import { startGoogleStandIn } from './google-stand-in';

/**
 * For development: `npx tsx server/session/google-stand-in-main.ts` starts the stand-in, and the server takes its word when it is told
 * the three settings that this prints. Nothing starts it otherwise.
 */
const DEFAULT_PORT = 4399;

async function main(): Promise<void> {
  const registration = { clientId: 'fettle-development', clientSecret: 'known to everybody' };
  const port = Number(process.env['GOOGLE_STAND_IN_PORT'] ?? DEFAULT_PORT);
  const { url } = await startGoogleStandIn({ ...registration, port, decide: 'ask' });
  process.stdout.write(
    [
      'The stand-in for Google listens. Start the server with:',
      `GOOGLE_STAND_IN_URL=${url}`,
      `GOOGLE_CLIENT_ID=${registration.clientId}`,
      `GOOGLE_CLIENT_SECRET="${registration.clientSecret}"`,
      '',
    ].join('\n'),
  );
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
