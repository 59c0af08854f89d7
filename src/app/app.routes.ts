import { inject } from '@angular/core';
import { Router, type Routes } from '@angular/router';
import { roleGuard, signedInGuard, signedOutGuard } from './session/session-guards';
import { SessionStore } from './session/session-store';
import { ErrorPage } from './shell/error-page';

const forMembers = roleGuard('member');
const forStaff = roleGuard('coach', 'owner');
const forOwners = roleGuard('owner');

/**
 * Every address of the application. A room's own pages are in its folder's `NAME.routes.ts` and load when it is
 * entered. The board stands outside the shell: it fills the window and keeps its own head.
 */
export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    canActivate: [signedOutGuard],
    loadComponent: () => import('./session/sign-in-page').then((m) => m.SignInPage),
  },
  {
    path: 'open-a-gym',
    title: 'Open a gym',
    canActivate: [signedOutGuard],
    loadComponent: () => import('./session/open-gym-page').then((m) => m.OpenGymPage),
  },
  {
    path: 'forgot',
    title: 'Choose a new password',
    loadComponent: () => import('./session/forgot-page').then((m) => m.ForgotPage),
  },
  {
    path: 'reset/:token',
    title: 'Choose a new password',
    loadComponent: () => import('./session/reset-page').then((m) => m.ResetPage),
  },
  {
    path: 'invitation/:token',
    title: 'Your invitation',
    loadComponent: () => import('./session/invitation-page').then((m) => m.InvitationPage),
  },
  {
    path: 'cautions',
    title: 'Cautions',
    loadComponent: () => import('./session/cautions-page').then((m) => m.CautionsPage),
  },
  {
    path: 'mailbox',
    title: 'Mailbox',
    loadComponent: () => import('./shell/mailbox/mailbox-page').then((m) => m.MailboxPage),
  },
  {
    path: 'kit',
    title: 'Kit of parts',
    loadChildren: () => import('./shared/kit/kit.routes').then((m) => m.ROUTES_KIT),
  },
  {
    path: 'unreachable',
    title: 'Out of reach',
    // Not fetched when it is needed, for then nothing can be fetched.
    component: ErrorPage,
  },
  {
    path: 'board',
    canActivate: [forStaff],
    loadChildren: () => import('./board/board.routes').then((m) => m.ROUTES_BOARD),
  },
  {
    path: '',
    canActivate: [signedInGuard],
    loadComponent: () => import('./shell/shell').then((m) => m.Shell),
    children: [
      {
        path: '',
        pathMatch: 'full',
        redirectTo: () => inject(Router).parseUrl(inject(SessionStore).home()),
      },
      {
        path: 'today',
        canActivate: [forMembers],
        loadChildren: () => import('./today/today.routes').then((m) => m.ROUTES_TODAY),
      },
      {
        path: 'filming',
        canActivate: [forMembers],
        loadChildren: () => import('./filming/filming.routes').then((m) => m.ROUTES_FILMING),
      },
      {
        path: 'answers',
        loadChildren: () => import('./answers/answers.routes').then((m) => m.ROUTES_ANSWERS),
      },
      {
        path: 'progress',
        loadChildren: () => import('./progress/progress.routes').then((m) => m.ROUTES_PROGRESS),
      },
      {
        path: 'queue',
        canActivate: [forStaff],
        loadChildren: () => import('./queue/queue.routes').then((m) => m.ROUTES_QUEUE),
      },
      {
        path: 'assignments',
        canActivate: [forStaff],
        loadChildren: () => import('./assignments/assignments.routes').then((m) => m.ROUTES_ASSIGNMENTS),
      },
      {
        path: 'lifts',
        canActivate: [forStaff],
        loadChildren: () => import('./lifts/lifts.routes').then((m) => m.ROUTES_LIFTS),
      },
      {
        path: 'people',
        canActivate: [forStaff],
        loadChildren: () => import('./people/people.routes').then((m) => m.ROUTES_PEOPLE),
      },
      {
        path: 'turnaround',
        canActivate: [forOwners],
        loadChildren: () => import('./turnaround/turnaround.routes').then((m) => m.ROUTES_TURNAROUND),
      },
      {
        path: 'gym',
        canActivate: [forOwners],
        loadChildren: () => import('./gym/gym.routes').then((m) => m.ROUTES_GYM),
      },
      {
        path: 'account',
        loadChildren: () => import('./account/account.routes').then((m) => m.ROUTES_ACCOUNT),
      },
      {
        path: '**',
        title: 'Not here',
        loadComponent: () => import('./shell/not-found-page').then((m) => m.NotFoundPage),
      },
    ],
  },
];
