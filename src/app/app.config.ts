import { provideHttpClient, withInterceptors } from '@angular/common/http';
import {
  ErrorHandler,
  inject,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
  provideZonelessChangeDetection,
  type ApplicationConfig,
} from '@angular/core';
import {
  TitleStrategy,
  provideRouter,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';
import { AppErrorHandler } from './core/app-error-handler';
import { HeadingFocus } from './core/heading-focus';
import { PlantTitle } from './core/plant-title';
import { SessionStore } from './core/session';
import { sessionInterceptor } from './core/session-interceptor';
import { routes } from './app.routes';

export const appConfig: ApplicationConfig = {
  providers: [
    provideZonelessChangeDetection(),
    provideBrowserGlobalErrorListeners(),
    { provide: ErrorHandler, useClass: AppErrorHandler },
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled' }),
    ),
    provideHttpClient(withInterceptors([sessionInterceptor])),
    { provide: TitleStrategy, useClass: PlantTitle },
    provideAppInitializer(async () => {
      inject(HeadingFocus);
      await inject(SessionStore).load();
    }),
  ],
};
