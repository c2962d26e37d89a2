import { Button, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import { fitsPattern, type ImportOptions, type ReadingRule } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useRuleChanges } from '../hooks/use-rule-changes.js';
import { suggestName, suggestPattern } from '../rules/file-name-pattern.js';
import { ruleFieldsSchema, type RuleFields } from '../rules/rule-fields.js';
import { RuleFormFields } from '../rules/rule-form-fields.js';
import { FormPart } from '../sheet/settings/form-part.js';

interface KeepRuleProps {
  projectId: string;
  fileName: string;
  columnNames: readonly string[];
  options: ImportOptions;
  /** False while the settings have a fault. */
  mayKeep: boolean;
  onKept: (rule: ReadingRule) => void;
}

/** Keeps the settings of the form as a reading rule of the project. */
export function KeepRule({ projectId, fileName, columnNames, options, mayKeep, onKept }: KeepRuleProps) {
  const pattern = suggestPattern(fileName);
  const form = useForm<RuleFields>({
    resolver: zodResolver(
      ruleFieldsSchema.refine((fields) => fitsPattern(fields.fileNamePattern, fileName), {
        path: ['fileNamePattern'],
        message: `Does not fit this file, ${fileName}`,
      }),
    ),
    defaultValues: { name: suggestName(pattern), fileNamePattern: pattern, bindsColumns: true },
  });
  const { create } = useRuleChanges(projectId);
  const keep = form.handleSubmit(({ name, fileNamePattern, bindsColumns }) =>
    create.mutate(
      { name, fileNamePattern, columnNames: bindsColumns ? [...columnNames] : null, options },
      {
        onSuccess: (rule) => {
          notifyDone(`“${rule.name}” is kept: new files that fit are read by it`);
          onKept(rule);
        },
        onError: (error) => setFormProblem(form, error),
      },
    ),
  );
  const { errors } = form.formState;
  return (
    <FormPart
      title="Keep these settings as a reading rule"
      summary="New files of the same kind are then read by them"
      isWrong={Object.keys(errors).length > 0}
    >
      <form noValidate onSubmit={keep} aria-label="New reading rule">
        <Stack gap="3">
          <FormProblem message={errors.root?.message} />
          <RuleFormFields form={form} columnNames={columnNames.length > 0 ? columnNames : null} />
          <Stack direction="row" align="center" gap="3" wrap="wrap">
            <Button type="submit" disabled={!mayKeep} loading={create.isPending}>
              Keep the rule
            </Button>
            <Text color="inkSoft" fontSize="13px">
              The file itself is read only when you say so below.
            </Text>
          </Stack>
        </Stack>
      </form>
    </FormPart>
  );
}
