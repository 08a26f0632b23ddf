import { createServer } from 'node:http';

/** Placeholder until the application is composed: answers so that the launch path can be exercised. */
const port = Number(process.env['PORT'] ?? 4300);
createServer((_request, response) => response.end('Fettle')).listen(port, process.env['HOST'] ?? '127.0.0.1');
