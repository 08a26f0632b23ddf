import { z } from 'zod';
import { endpoint, EVERYBODY, OFFICE, OWNER, Role, ById } from './endpoint';
import { Id, Instant, Name, Version } from './primitives';

/** Who is signed in, and the token that unsafe requests send back in `X-Fettle-Token`. */
export const SessionView = z.object({
  account: z
    .object({
      id: Id,
      name: z.string(),
      email: z.string(),
      role: Role,
      makerId: Id.nullable(),
      clientId: Id.nullable(),
    })
    .nullable(),
  formToken: z.string(),
  googleSignIn: z.boolean(),
  studio: z.object({ name: z.string(), zone: z.string(), currency: z.string() }),
});
export type SessionView = z.infer<typeof SessionView>;

export const SignIn = z.object({
  email: z.email('Write the whole e-mail address.').max(254),
  password: z.string().min(1, 'Write your password.').max(1024),
});

export const AccountView = z.object({
  id: Id,
  name: z.string(),
  email: z.string(),
  role: Role,
  makerId: Id.nullable(),
  clientId: Id.nullable(),
  active: z.boolean(),
  lastSignInAt: Instant.nullable(),
  version: Version,
});
export type AccountView = z.infer<typeof AccountView>;

const NewPassword = z.string().min(12, 'Use at least 12 characters.').max(1024);

const accountFields = {
  name: Name,
  email: z.email().max(254),
  role: Role,
  makerId: Id.nullable(),
  clientId: Id.nullable(),
};
export const AccountCreate = z.object({ ...accountFields, password: NewPassword.nullable() });
export const AccountChange = z
  .object({ ...accountFields, active: z.boolean(), password: NewPassword })
  .partial()
  .extend({ version: Version });

export const sessionEndpoints = {
  readSession: endpoint({
    method: 'GET',
    path: '/api/session',
    who: 'anyone',
    summary: 'Who is signed in',
    response: SessionView,
  }),
  signIn: endpoint({
    method: 'POST',
    path: '/api/session',
    who: 'anyone',
    summary: 'Sign in with an e-mail address and a password',
    body: SignIn,
    response: SessionView,
  }),
  signOut: endpoint({ method: 'DELETE', path: '/api/session', who: EVERYBODY, summary: 'Sign out' }),
  listAccounts: endpoint({
    method: 'GET',
    path: '/api/accounts',
    who: OFFICE,
    summary: 'People who may sign in',
    response: z.array(AccountView),
  }),
  createAccount: endpoint({
    method: 'POST',
    path: '/api/accounts',
    who: OWNER,
    summary: 'Let a person sign in',
    body: AccountCreate,
    response: AccountView,
    status: 201,
  }),
  changeAccount: endpoint({
    method: 'PATCH',
    path: '/api/accounts/:id',
    who: OWNER,
    summary: "Change a person's account",
    params: ById,
    body: AccountChange,
    response: AccountView,
  }),
};
