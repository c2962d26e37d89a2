import { Button, Stack, Text } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import type { ReadingRule } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormProblem } from '../../../components/form-problem.js';
import { Modal } from '../../../components/modal.js';
import { notifyDone } from '../../../components/notify.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useRuleChanges } from '../hooks/use-rule-changes.js';
import { ruleFieldsSchema, type RuleFields } from './rule-fields.js';
import { RuleFormFields } from './rule-form-fields.js';

interface RuleDialogProps {
  projectId: string;
  rule: ReadingRule;
  open: boolean;
  onClose: () => void;
}

/**
 * Name of a rule and the files it is for. What it sets is changed on a file, where its effect is seen: a form without
 * one could not show a wrong factor.
 */
export function RuleDialog({ rule, open, onClose, ...props }: RuleDialogProps) {
  return (
    <Modal open={open} onClose={onClose} title={`Edit “${rule.name}”`} size="lg">
      <RuleForm {...props} rule={rule} onClose={onClose} />
    </Modal>
  );
}

function RuleForm({ projectId, rule, onClose }: Omit<RuleDialogProps, 'open'>) {
  const form = useForm<RuleFields>({
    resolver: zodResolver(ruleFieldsSchema),
    defaultValues: {
      name: rule.name,
      fileNamePattern: rule.fileNamePattern,
      bindsColumns: rule.columnNames !== null,
    },
  });
  const { update } = useRuleChanges(projectId);
  const save = form.handleSubmit(({ name, fileNamePattern, bindsColumns }) =>
    update.mutate(
      {
        id: rule.id,
        change: { name, fileNamePattern, columnNames: bindsColumns ? rule.columnNames : null },
      },
      {
        onSuccess: () => {
          notifyDone('Rule saved');
          onClose();
        },
        onError: (error) => setFormProblem(form, error),
      },
    ),
  );
  return (
    <form noValidate onSubmit={save}>
      <Stack gap="4">
        <FormProblem message={form.formState.errors.root?.message} />
        <RuleFormFields form={form} columnNames={rule.columnNames} />
        <Text color="inkSoft" fontSize="13px">
          To change what the rule sets, drop a file it fits under Recordings with “Check before reading”
          ticked: there you see what comes of each setting, and “Update the rule” keeps it.
        </Text>
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="solid" loading={update.isPending}>
            Save
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
