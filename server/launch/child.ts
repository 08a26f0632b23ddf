import { spawn, type ChildProcess, type StdioOptions } from 'node:child_process';
import { constants } from 'node:os';
import { ROOT } from './places';

/** What to run and how long it may take. */
export interface Errand {
  readonly program: string;
  readonly args: readonly string[];
  readonly env?: Readonly<Record<string, string>>;
  readonly stdio?: StdioOptions;
  readonly limitMs: number;
}

/** How an errand ended. `code` is never 0 when the time ran out. */
export interface ErrandEnd {
  readonly code: number;
  readonly timedOut: boolean;
}

const GRACE_MS = 5_000;

const running = new Set<ChildProcess>();

/**
 * Runs a program in a process group of its own and waits for its end. When its time is up, or when we are told to
 * end, the whole group goes: a build or a browser must not outlive what started it.
 */
export function runErrand({ program, args, env = {}, stdio = 'inherit', limitMs }: Errand): Promise<ErrandEnd> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { cwd: ROOT, env: { ...process.env, ...env }, stdio, detached: true });
    running.add(child);
    let timedOut = false;
    const limit = setTimeout(() => {
      timedOut = true;
      endGroup(child, 'SIGTERM');
      setTimeout(() => endGroup(child, 'SIGKILL'), GRACE_MS).unref();
    }, limitMs);
    child.once('error', reject);
    child.once('exit', (code, signal) => {
      clearTimeout(limit);
      running.delete(child);
      const ended = code ?? 128 + (signal === null ? 0 : constants.signals[signal]);
      resolve({ code: timedOut && ended === 0 ? 1 : ended, timedOut });
    });
  });
}

/** Ends every errand that still runs, with all that it started. */
export function endErrands(): void {
  for (const child of running) endGroup(child, 'SIGTERM');
}

function endGroup(child: ChildProcess, signal: NodeJS.Signals): void {
  if (child.pid === undefined) return;
  try {
    process.kill(-child.pid, signal);
  } catch {
    // The group has ended by itself.
  }
}
