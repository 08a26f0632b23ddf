import { provideHttpClient, withInterceptors } from '@angular/common/http';
import {
  ErrorHandler,
  inject,
  isDevMode,
  provideBrowserGlobalErrorListeners,
  type ApplicationConfig,
} from '@angular/core';
import { MAT_FORM_FIELD_DEFAULT_OPTIONS, type MatFormFieldDefaultOptions } from '@angular/material/form-field';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withRouterConfig,
} from '@angular/router';
import { provideServiceWorker } from '@angular/service-worker';
import { routes } from './routes';
import { sessionInterceptor, SessionStore } from './session';
import { ErrorReporter } from './shell/error-reporter';
import { PageTitle } from './shell/page-title';
import { STUDIO_CURRENCY } from './ui/money';
import { deviceZone, STUDIO_CLOCK, type StudioClock } from './ui/studio-clock';

const fields: MatFormFieldDefaultOptions = { appearance: 'outline', subscriptSizing: 'dynamic' };

const clock = (): StudioClock => ({
  zone: inject(SessionStore).zone,
  viewerZone: deviceZone(),
  now: () => Date.now(),
});

/** What the application is given at start. */
export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
      withRouterConfig({ paramsInheritanceStrategy: 'always' }),
    ),
    provideHttpClient(withInterceptors([sessionInterceptor])),
    provideServiceWorker('ngsw-worker.js', { enabled: !isDevMode(), registrationStrategy: 'registerWhenStable:30000' }),
    { provide: ErrorHandler, useClass: ErrorReporter },
    { provide: TitleStrategy, useExisting: PageTitle },
    { provide: MAT_FORM_FIELD_DEFAULT_OPTIONS, useValue: fields },
    { provide: STUDIO_CLOCK, useFactory: clock },
    { provide: STUDIO_CURRENCY, useFactory: () => inject(SessionStore).currency },
  ],
};
