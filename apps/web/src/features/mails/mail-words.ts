import type { MailKind } from '@overtally/contracts';

/** What a message is for. */
export const kindWords: Record<MailKind, string> = {
  'review-requested': 'Review requested',
  'report-returned': 'Report returned',
  'report-issued': 'Report issued',
  'calibration-due': 'Calibration due',
  invitation: 'Invitation',
  'password-reset': 'New password asked for',
  'password-changed': 'Password changed',
};
