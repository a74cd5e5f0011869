import type { Routes } from '@angular/router';
import { allowed, signedIn } from './core/guards';

/** One lazy route a job: whoever enters samples never downloads the charts. */
export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    loadComponent: async () => (await import('./sign-in/sign-in')).SignIn,
  },
  {
    path: '',
    loadComponent: async () => (await import('./shell/shell')).Shell,
    canActivate: [signedIn],
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'board' },
      {
        path: 'board',
        title: 'Board',
        canActivate: [allowed('look')],
        loadComponent: async () => (await import('./board/board')).Board,
      },
      {
        path: 'towers/:towerId',
        title: 'Tower',
        canActivate: [allowed('look')],
        loadComponent: async () => (await import('./tower/tower')).Tower,
      },
      {
        path: 'samples',
        title: 'Samples',
        canActivate: [allowed('look')],
        loadComponent: async () => (await import('./samples/samples')).Samples,
      },
      {
        path: 'desk',
        title: 'Equilibrium desk',
        canActivate: [allowed('look')],
        loadComponent: async () => (await import('./desk/desk')).Desk,
      },
      {
        path: 'journal',
        title: 'Journal',
        canActivate: [allowed('look')],
        loadComponent: async () => (await import('./journal/journal')).Journal,
      },
      {
        path: 'not-allowed',
        title: 'Not for your role',
        loadComponent: async () => (await import('./shell/not-allowed')).NotAllowed,
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: async () => (await import('./shell/not-found')).NotFound,
      },
    ],
  },
];
