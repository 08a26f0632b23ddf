import { Obstacle } from '@database/cluster/obstacle';

/** Says what is happening, on stderr, so that a program's own output stays clean. */
export function say(sentence: string): void {
  process.stderr.write(`${sentence}\n`);
}

/** Runs a launcher; an obstacle ends it with its one sentence, anything else with all that is known of it. */
export function launch(main: () => Promise<void>): void {
  main().catch((error: unknown) => {
    if (error instanceof Obstacle) say(error.message);
    else console.error(error);
    process.exit(1);
  });
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
