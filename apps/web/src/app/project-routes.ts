import type { RouteObject } from 'react-router-dom';

/** Pages inside a project, below /projects/:projectId. */
export const projectRoutes: RouteObject[] = [
  { path: 'recordings', lazy: () => import('./routes/project/recordings.js') },
  { path: 'recordings/:recordingId', lazy: () => import('./routes/project/recording.js') },
  { path: 'members', lazy: () => import('./routes/project/members.js') },
  { path: 'settings', lazy: () => import('./routes/project/settings.js') },
];
