import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { BareProblem } from './layouts/bare-problem.js';
import { StartingUp } from './layouts/starting-up.js';
import { projectRoutes } from './project-routes.js';

/** All pages; each is fetched when it is first visited. */
export const routes: RouteObject[] = [
  {
    path: '/sign-in',
    lazy: () => import('./routes/sign-in.js'),
    HydrateFallback: StartingUp,
    ErrorBoundary: BareProblem,
  },
  ...[
    { path: '/forgot-password', lazy: () => import('./routes/forgot-password.js') },
    { path: '/reset-password', lazy: () => import('./routes/reset-password.js') },
    { path: '/invitation', lazy: () => import('./routes/invitation.js') },
  ].map((route) => ({ ...route, HydrateFallback: StartingUp, ErrorBoundary: BareProblem })),
  {
    path: '/check/:number?/:code?',
    lazy: () => import('./routes/check.js'),
    HydrateFallback: StartingUp,
    ErrorBoundary: BareProblem,
  },
  {
    path: '/',
    lazy: () => import('./layouts/signed-in.js'),
    HydrateFallback: StartingUp,
    ErrorBoundary: BareProblem,
    children: [
      { index: true, lazy: () => import('./routes/home.js') },
      {
        lazy: () => import('./layouts/general.js'),
        children: [
          { path: 'projects', lazy: () => import('./routes/projects.js') },
          { path: 'account', lazy: () => import('./routes/account.js') },
          { path: 'instruments', lazy: () => import('./routes/instruments.js') },
          { path: 'instruments/:instrumentId', lazy: () => import('./routes/instrument.js') },
          { path: 'measuring-chains', lazy: () => import('./routes/measuring-chains.js') },
          { path: 'laboratory', lazy: () => import('./routes/laboratory.js') },
          { path: 'people', lazy: () => import('./routes/people.js') },
          { path: 'mailbox', lazy: () => import('./routes/mailbox.js') },
          { path: 'mailbox/:mailId', lazy: () => import('./routes/mail.js') },
          { path: '*', lazy: () => import('./routes/not-found.js') },
        ],
      },
      {
        path: 'projects/:projectId',
        lazy: () => import('./layouts/project.js'),
        children: [
          { index: true, lazy: () => import('./routes/project/home.js') },
          ...projectRoutes,
          { path: '*', lazy: () => import('./routes/not-found.js') },
        ],
      },
    ],
  },
];

export const createRouter = () => createBrowserRouter(routes);
