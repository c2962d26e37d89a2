import { profileSchema, type Project, type Settings, type UpdateProject } from '@overtally/contracts';
import { z } from 'zod';

const nominalChoices = ['auto', '50', '60', 'other'] as const;

/** The settings page as its form holds it. */
export const projectFormSchema = z
  .object({
    name: z.string().trim().min(1, 'Name the project').max(160, 'Use at most 160 characters'),
    customer: z.string().trim().max(160, 'Use at most 160 characters'),
    customerContact: z.string().trim().max(500, 'Use at most 500 characters'),
    preparerMayIssue: z.boolean(),
    description: z.string().trim().max(2000, 'Use at most 2000 characters'),
    profile: profileSchema,
    nominal: z.enum(nominalChoices),
    nominalOtherHz: z.string().trim(),
    comparisonLimitSetId: z.string(),
  })
  .superRefine((values, context) => {
    if (values.nominal !== 'other') return;
    const hz = Number(values.nominalOtherHz.replace(',', '.'));
    if (values.nominalOtherHz === '' || !(hz >= 0.1 && hz <= 1e6)) {
      context.addIssue({
        code: 'custom',
        path: ['nominalOtherHz'],
        message: 'Give a frequency from 0.1 Hz to 1 MHz',
      });
    }
  });
export type ProjectForm = z.infer<typeof projectFormSchema>;

/** Form values of a stored project. */
export function toForm(project: Project): ProjectForm {
  const { profile, nominalFrequencyHz } = project.defaultSettings;
  const known = nominalChoices.find((choice) => choice === String(nominalFrequencyHz));
  return {
    name: project.name,
    customer: project.customer,
    customerContact: project.customerContact,
    preparerMayIssue: project.preparerMayIssue,
    description: project.description,
    profile,
    nominal: known ?? 'other',
    nominalOtherHz: known ? '' : String(nominalFrequencyHz),
    comparisonLimitSetId: project.comparisonLimitSetId ?? '',
  };
}

function nominalFrequency(values: ProjectForm): Settings['nominalFrequencyHz'] {
  if (values.nominal === 'auto') return 'auto';
  return Number(values.nominal === 'other' ? values.nominalOtherHz.replace(',', '.') : values.nominal);
}

/** What to send; settings that this page does not show stay as they are. */
export function toUpdate(project: Project, values: ProjectForm): UpdateProject {
  return {
    name: values.name,
    customer: values.customer,
    customerContact: values.customerContact,
    preparerMayIssue: values.preparerMayIssue,
    description: values.description,
    defaultSettings: {
      ...project.defaultSettings,
      profile: values.profile,
      nominalFrequencyHz: nominalFrequency(values),
    },
    comparisonLimitSetId: values.comparisonLimitSetId === '' ? null : values.comparisonLimitSetId,
  };
}
