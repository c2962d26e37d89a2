import type { UseFormReturn } from 'react-hook-form';
import type { LimitSetFormValues } from './limit-set-form-values.js';

/** The form of a custom set: typed texts in, the same texts checked out. */
export type LimitSetForm = UseFormReturn<LimitSetFormValues, unknown, LimitSetFormValues>;
