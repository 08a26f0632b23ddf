import type { Role, SessionView } from '@common/contract';

const IDS: Readonly<Record<Role, string>> = {
  owner: '11111111-1111-4111-8111-111111111111',
  manager: '22222222-2222-4222-8222-222222222222',
  maker: '33333333-3333-4333-8333-333333333333',
  client: '44444444-4444-4444-8444-444444444444',
};

/** What the server says of a session: signed in with a role, or nobody. */
export function sessionView(role: Role | null, formToken = 'token-1'): SessionView {
  const account = role && {
    id: IDS[role],
    name: 'Ada Quill',
    email: 'ada@example.test',
    role,
    makerId: role === 'maker' ? IDS.maker : null,
    clientId: role === 'client' ? IDS.client : null,
  };
  return {
    account,
    formToken,
    googleSignIn: false,
    studio: { name: 'Test Studio', zone: 'Europe/London', currency: 'GBP' },
  };
}
