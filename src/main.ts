import { bootstrapApplication } from '@angular/platform-browser';
import { App } from './app/app';
import { appConfig } from './app/app.config';

bootstrapApplication(App, appConfig).catch((error: unknown) => {
  document.body.textContent =
    'Midfoot could not start. Load this page again; if that does not help, tell your gym.';
  reportError(error);
});
