import { computed, inject, Injectable, signal } from '@angular/core';
import { endpoints, type Role, type SessionView } from '@common/contract';
import { Api } from '../api';
import { FormToken } from './form-token';

/** The account that is signed in. */
export type Account = NonNullable<SessionView['account']>;

/** Who is signed in, and what the studio is called. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly api = inject(Api);
  private readonly formToken = inject(FormToken);
  private readonly session = signal<SessionView | null>(null);
  private loading: Promise<SessionView> | null = null;

  /** The signed-in account; null where nobody is, or where it is not known yet. */
  readonly account = computed<Account | null>(() => this.session()?.account ?? null);
  readonly role = computed<Role | null>(() => this.account()?.role ?? null);
  readonly studioName = computed(() => this.session()?.studio.name ?? '');
  /** The studio's IANA time zone; UTC before it is known. */
  readonly zone = computed(() => this.session()?.studio.zone ?? 'UTC');
  /** The studio's ISO 4217 currency. */
  readonly currency = computed(() => this.session()?.studio.currency ?? 'GBP');
  readonly offersGoogle = computed(() => this.session()?.googleSignIn ?? false);
  /** Whether the signed-in account runs the office: an owner or a manager. */
  readonly isOffice = computed(() => this.role() === 'owner' || this.role() === 'manager');

  /** Asks the server who is signed in, once; later calls share the answer. Rejects with an `ApiFailure`. */
  load(): Promise<SessionView> {
    const known = this.session();
    if (known !== null) {
      return Promise.resolve(known);
    }
    this.loading ??= this.refresh().finally(() => (this.loading = null));
    return this.loading;
  }

  /** Asks again, as after the form token went stale. */
  async refresh(): Promise<SessionView> {
    return this.take(await this.api.callEndpoint(endpoints.readSession));
  }

  /** Signs in by e-mail address and password. Rejects with an `ApiFailure` of kind `wrong-credentials` where they are not right. */
  async signIn(email: string, password: string): Promise<SessionView> {
    await this.load();
    return this.take(await this.api.callEndpoint(endpoints.signIn, { body: { email, password } }));
  }

  /** Signs out here and on the server. */
  async signOut(): Promise<void> {
    await this.api.callEndpoint(endpoints.signOut);
    this.forget();
  }

  /** Forgets who was signed in, as when the server says that nobody is. */
  forget(): void {
    this.session.set(null);
    this.formToken.value = '';
  }

  private take(session: SessionView): SessionView {
    this.formToken.value = session.formToken;
    this.session.set(session);
    return session;
  }
}
