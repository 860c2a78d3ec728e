import { bootstrapApplication } from '@angular/platform-browser';
import { App } from './app/app';
import { appConfig } from './app/app.config';
import { snapshots } from './app/core/session/snapshot';

// Whoever was never signed in here is about to see the sign-in page: fetch it while the rest starts.
if (!snapshots.read()) void import('./app/public/sign-in/sign-in').catch(() => undefined);

bootstrapApplication(App, appConfig).catch((error: unknown) => {
  // Nothing of ours is running yet that could show it.
  reportError(error);
});
