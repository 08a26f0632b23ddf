import { createServer, type AddressInfo } from 'node:net';
import { readAddress, refuseTakenPort } from './address';

describe('readAddress', () => {
  it('serves on loopback when nothing is said', () => {
    expect(readAddress({})).toEqual({ host: '127.0.0.1', port: 4300, url: 'http://127.0.0.1:4300' });
  });

  it('takes port and host from the environment', () => {
    expect(readAddress({ PORT: '8080', HOST: '::1' }).url).toBe('http://[::1]:8080');
    expect(readAddress({ HOST: '0.0.0.0' })).toMatchObject({ host: '0.0.0.0', url: 'http://127.0.0.1:4300' });
  });

  it.each(['0', '65536', '80.5', 'http', '-1'])('refuses %s as a port, naming it', (port) => {
    expect(() => readAddress({ PORT: port })).toThrow(`PORT is "${port}"`);
  });
});

describe('refuseTakenPort', () => {
  it('names the port and a way out when another program has it', async () => {
    const other = createServer();
    await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
    const { port } = other.address() as AddressInfo;
    try {
      const refusal = refuseTakenPort({ host: '127.0.0.1', port, url: '' });
      await expect(refusal).rejects.toThrow(`Port ${String(port)} is used by another program: choose another`);
    } finally {
      other.close();
    }
  });
});
