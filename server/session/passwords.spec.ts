import { hashPassword, isPassword } from './passwords';

describe('a password', () => {
  it('is kept as a salted argon2id hash of the cost that the OWASP Password Storage Cheat Sheet names', async () => {
    const [first, second] = [await hashPassword('a long enough secret'), await hashPassword('a long enough secret')];
    expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(second).not.toBe(first);
  });

  it('belongs to its own hash alone', async () => {
    const hash = await hashPassword('a long enough secret');
    expect(await isPassword('a long enough secret', hash)).toBe(true);
    expect(await isPassword('a long enough secreT', hash)).toBe(false);
  });

  it('lets nobody in where there is no account, though a hash is checked there too', async () => {
    expect(await isPassword('nobody has this password', null)).toBe(false);
  });
});
