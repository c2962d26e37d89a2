import type { CreateLimitSet } from '@overtally/contracts';
import type { UseFormReturn } from 'react-hook-form';
import type { LimitSetFormValues } from './limit-set-form-values.js';

/** The form of a custom set: typed texts in, a set to create out. */
export type LimitSetForm = UseFormReturn<LimitSetFormValues, unknown, CreateLimitSet>;
