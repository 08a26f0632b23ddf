/** Starts the planning worker. Alone in its file, because `import.meta.url` has no meaning where the specs run. */
export function spawnWorker(): Worker {
  return new Worker(new URL('./planning.worker', import.meta.url), { type: 'module' });
}
