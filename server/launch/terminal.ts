import { Obstacle } from '@database/cluster/obstacle';

/** Says what is happening, on stderr, so that a program's own output stays clean. */
export function say(sentence: string): void {
  process.stderr.write(`${sentence}\n`);
}

/** Runs a launcher; an obstacle ends it with its one sentence, anything else with all that is known of it. */
export function launch(main: () => Promise<void>): void {
  main().catch((error: unknown) => {
    const sentence = obstacleIn(error);
    if (sentence === undefined) console.error(error);
    else say(sentence);
    process.exit(1);
  });
}

/** What stands in the way, in one sentence, where an error is the machine's and not the program's. */
export function obstacleIn(error: unknown): string | undefined {
  if (error instanceof Obstacle) return error.message;
  if (typeof error !== 'object' || error === null || !('code' in error)) return undefined;
  const { code, path = 'The project' } = error as NodeJS.ErrnoException;
  if (code === 'EACCES' || code === 'EPERM' || code === 'EROFS') {
    return `${path} may not be written by this user: run the command as the user who made it, or give it to this one.`;
  }
  if (code === 'ENOSPC') return `The disk is full: make room and run the command again.`;
  return undefined;
}

/**
 * A promise of the first signal that asks this process to end. Repeats are swallowed: a terminal sends Ctrl-C to
 * every process of the group and npm passes it on once more.
 */
export function askedToEnd(): Promise<NodeJS.Signals> {
  return new Promise((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => resolve(signal));
  });
}
