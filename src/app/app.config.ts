import { provideHttpClient, withInterceptors, withXsrfConfiguration } from '@angular/common/http';
import {
  ErrorHandler,
  inject,
  provideBrowserGlobalErrorListeners,
  provideZonelessChangeDetection,
  type ApplicationConfig,
} from '@angular/core';
import {
  provideRouter,
  RedirectCommand,
  Router,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withNavigationErrorHandler,
  withRouterConfig,
} from '@angular/router';
import { routes } from './app.routes';
import { crossSiteTokenInterceptor, sessionInterceptor } from './session/session-interceptor';
import { AppErrorHandler } from './shell/app-error-handler';
import { PageTitle } from './shell/page-title';

/** What the application is made with. HttpClient stays on XHR (no `withFetch`): only XHR tells an upload's progress. */
export const appConfig: ApplicationConfig = {
  providers: [
    provideZonelessChangeDetection(),
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
      withRouterConfig({ paramsInheritanceStrategy: 'always' }),
      withNavigationErrorHandler(({ error }) => {
        inject(ErrorHandler).handleError(error);
        return new RedirectCommand(inject(Router).parseUrl('/unreachable'), { skipLocationChange: true });
      }),
    ),
    provideHttpClient(
      withXsrfConfiguration({ cookieName: 'XSRF-TOKEN', headerName: 'X-XSRF-TOKEN' }),
      withInterceptors([sessionInterceptor, crossSiteTokenInterceptor]),
    ),
    { provide: TitleStrategy, useClass: PageTitle },
    { provide: ErrorHandler, useClass: AppErrorHandler },
  ],
};
