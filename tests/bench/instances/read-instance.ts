import { readFileSync } from 'node:fs';
import { extname } from 'node:path';
import type { InstanceData } from './instance-data';
import { InstanceFault } from './line-reader';
import { readDzn } from './read-dzn';
import { readMplib } from './read-mplib';
import { readSch } from './read-sch';
import { readSm } from './read-sm';

const readers: Readonly<Record<string, (file: string, text: string) => InstanceData>> = {
  '.sm': readSm,
  '.sch': readSch,
  '.txt': readMplib,
  '.dzn': readDzn,
};

/** Whether a file's ending is one that the bench reads. */
export function isInstanceFile(file: string): boolean {
  return extname(file).toLowerCase() in readers;
}

/** Reads an instance in the format that its ending says; every fault is an `InstanceFault` with a sentence. */
export function readInstance(file: string): InstanceData {
  const read = readers[extname(file).toLowerCase()];
  if (read === undefined) throw new InstanceFault(file, 1, 'the ending should be .sm, .sch, .txt or .dzn.');
  let text: string;
  try {
    text = readFileSync(file, 'utf8');
  } catch {
    throw new InstanceFault(file, 1, 'the file cannot be read.');
  }
  return read(file, text);
}
