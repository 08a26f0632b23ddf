/**
 * Stands in for the file that constructs web workers, because `import.meta.url` has no meaning in Jest's CommonJS.
 * A spec that needs answers from a worker provides its own fake in its place.
 */
export function spawnWorker(): Worker {
  throw new Error('A unit test tried to start a real web worker; provide a fake engine instead.');
}
