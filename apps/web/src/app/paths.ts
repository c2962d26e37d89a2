import { reportCheckPath } from '@overtally/contracts';

const project = (projectId: string) => `/projects/${projectId}`;

/** Addresses of all pages. */
export const paths = {
  signIn: (next?: string) =>
    next && next !== '/' ? `/sign-in?next=${encodeURIComponent(next)}` : '/sign-in',
  /** The public check page, filled in when number and code are given. */
  check: (number?: string, code?: string) => (number && code ? reportCheckPath(number, code) : '/check'),
  projects: () => '/projects',
  forgotPassword: () => '/forgot-password',
  account: () => '/account',
  mailbox: () => '/mailbox',
  mail: (mailId: string) => `/mailbox/${mailId}`,
  people: () => '/people',
  laboratory: () => '/laboratory',
  instruments: () => '/instruments',
  instrument: (instrumentId: string) => `/instruments/${instrumentId}`,
  chains: () => '/measuring-chains',
  project,
  recordings: (projectId: string) => `${project(projectId)}/recordings`,
  recording: (projectId: string, recordingId: string) => `${project(projectId)}/recordings/${recordingId}`,
  equipment: (projectId: string) => `${project(projectId)}/equipment`,
  overlay: (projectId: string, recordingIds: readonly string[] = []) =>
    `${project(projectId)}/overlay${recordingIds.length > 0 ? `?r=${recordingIds.join(',')}` : ''}`,
  limits: (projectId: string) => `${project(projectId)}/limits`,
  newLimitSet: (projectId: string) => `${project(projectId)}/limits/new`,
  limitSet: (projectId: string, limitSetId: string) =>
    `${project(projectId)}/limits/${encodeURIComponent(limitSetId)}`,
  newLimitSetVersion: (projectId: string, limitSetId: string) =>
    `${project(projectId)}/limits/${encodeURIComponent(limitSetId)}/new-version`,
  studies: (projectId: string) => `${project(projectId)}/studies`,
  newStudy: (projectId: string, from?: { analysisId: string; channel: number }) =>
    `${project(projectId)}/studies/new${from ? `?analysis=${from.analysisId}&channel=${from.channel}` : ''}`,
  study: (projectId: string, studyId: string, version?: number) =>
    `${project(projectId)}/studies/${studyId}${version === undefined ? '' : `?version=${version}`}`,
  reports: (projectId: string) => `${project(projectId)}/reports`,
  newReport: (projectId: string, verdictIds: readonly string[] = []) =>
    `${project(projectId)}/reports/new${verdictIds.length > 0 ? `?verdicts=${verdictIds.join(',')}` : ''}`,
  report: (projectId: string, reportId: string) => `${project(projectId)}/reports/${reportId}`,
  members: (projectId: string) => `${project(projectId)}/members`,
  projectSettings: (projectId: string) => `${project(projectId)}/settings`,
} as const;

/** The page to return to after signing in; only addresses of this application count. */
export function safeNext(next: string | null): string {
  const isOwn = next !== null && /^\/(?![/\\])/.test(next);
  return isOwn ? next : paths.projects();
}
