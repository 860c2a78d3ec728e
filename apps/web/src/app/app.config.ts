import { provideHttpClient, withFetch, withInterceptors } from '@angular/common/http';
import {
  type ApplicationConfig,
  ErrorHandler,
  inject,
  isDevMode,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
  provideZonelessChangeDetection,
} from '@angular/core';
import {
  provideRouter,
  RedirectCommand,
  Router,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withNavigationErrorHandler,
} from '@angular/router';
import { MAT_FORM_FIELD_DEFAULT_OPTIONS } from '@angular/material/form-field';
import { provideServiceWorker } from '@angular/service-worker';
import { routes } from './app.routes';
import { NewVersion } from './core/messages/new-version';
import { PageErrors } from './core/messages/page-errors';
import { Titles } from './core/navigation/titles';
import { sessionInterceptor } from './core/session/session-interceptor';

export const appConfig: ApplicationConfig = {
  providers: [
    provideZonelessChangeDetection(),
    provideBrowserGlobalErrorListeners(),
    { provide: ErrorHandler, useClass: PageErrors },
    provideHttpClient(withFetch(), withInterceptors([sessionInterceptor])),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
      withNavigationErrorHandler(() => {
        const page = inject(Router).parseUrl('/went-wrong');
        return new RedirectCommand(page, { skipLocationChange: true });
      }),
    ),
    {
      // A form marks what may be left out, in its label, rather than everything that may not.
      provide: MAT_FORM_FIELD_DEFAULT_OPTIONS,
      useValue: { appearance: 'outline', hideRequiredMarker: true, subscriptSizing: 'dynamic' },
    },
    { provide: TitleStrategy, useExisting: Titles },
    provideServiceWorker('ngsw-worker.js', {
      enabled: !isDevMode(),
      registrationStrategy: 'registerWhenStable:30000',
    }),
    provideAppInitializer(() => inject(NewVersion).watch()),
  ],
};
