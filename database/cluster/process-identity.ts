import { readFileSync } from 'node:fs';

/**
 * Names one process for good. A number alone does not: numbers are handed out again, in a restarted container
 * often to the very same program.
 */
export interface ProcessIdentity {
  readonly pid: number;
  /** When the kernel started it, in clock ticks since boot, with the boot it belongs to; empty where there is no /proc. */
  readonly birth: string;
}

/** The identity of a living process, or undefined when there is none of that number. */
export function identify(pid: number): ProcessIdentity | undefined {
  if (process.platform !== 'linux') return signalReaches(pid) ? { pid, birth: '' } : undefined;
  try {
    const stat = readFileSync(`/proc/${String(pid)}/stat`, 'utf8');
    // The program's name, in brackets, may hold blanks and brackets itself: count the fields after the last one.
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    const [state] = fields;
    if (state === 'Z' || state === 'X') return undefined;
    const bootId = readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim();
    return { pid, birth: `${bootId}/${fields[19] ?? ''}` };
  } catch {
    return undefined;
  }
}

/** Whether that very process, and not a later one of the same number, is still alive. */
export function isAlive(identity: ProcessIdentity): boolean {
  return identify(identity.pid)?.birth === identity.birth;
}

function signalReaches(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
