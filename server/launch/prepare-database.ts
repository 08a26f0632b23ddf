import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { Obstacle } from '@database/cluster/obstacle';
import { DIST, ROOT } from './places';

/**
 * Brings a database to the present schema and fills an empty one with the demo studio, through the built program
 * that an operator would use. Answers with the lines that a newcomer needs: who can sign in.
 */
export function prepareDatabase(databaseUrl: string): Promise<readonly string[]> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ['--enable-source-maps', join(DIST, 'server', 'migrate.js'), '--with-demo'], {
      cwd: ROOT,
      env: { ...process.env, DATABASE_URL: databaseUrl },
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    let said = '';
    child.stdout.on('data', (chunk: Buffer) => (said += chunk.toString()));
    child.once('error', reject);
    child.once('close', (code) => {
      if (code === 0) resolve(said.split('\n').filter((line) => line !== ''));
      else reject(new Obstacle('The database could not be brought up to date: see what it says above.'));
    });
  });
}
