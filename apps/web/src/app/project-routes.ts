import type { RouteObject } from 'react-router-dom';

/** Pages inside a project, below /projects/:projectId. */
export const projectRoutes: RouteObject[] = [
  { path: 'recordings', lazy: () => import('./routes/project/recordings.js') },
  { path: 'recordings/:recordingId', lazy: () => import('./routes/project/recording.js') },
  { path: 'equipment', lazy: () => import('./routes/project/equipment.js') },
  { path: 'overlay', lazy: () => import('./routes/project/overlay.js') },
  { path: 'limits', lazy: () => import('./routes/project/limits.js') },
  { path: 'limits/new', lazy: () => import('./routes/project/new-limit-set.js') },
  { path: 'limits/:limitSetId', lazy: () => import('./routes/project/limit-set.js') },
  {
    path: 'limits/:limitSetId/new-version',
    lazy: () => import('./routes/project/new-limit-set-version.js'),
  },
  { path: 'studies', lazy: () => import('./routes/project/studies.js') },
  { path: 'studies/new', lazy: () => import('./routes/project/new-study.js') },
  { path: 'studies/:studyId', lazy: () => import('./routes/project/study.js') },
  { path: 'reports', lazy: () => import('./routes/project/reports.js') },
  { path: 'reports/new', lazy: () => import('./routes/project/new-report.js') },
  { path: 'reports/:reportId', lazy: () => import('./routes/project/report.js') },
  { path: 'members', lazy: () => import('./routes/project/members.js') },
  { path: 'settings', lazy: () => import('./routes/project/settings.js') },
];
