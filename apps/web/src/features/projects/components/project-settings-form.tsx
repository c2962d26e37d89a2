import { Box, Button, Flex, Input, Stack, Text, Textarea } from '@chakra-ui/react';
import { zodResolver } from '@hookform/resolvers/zod';
import type { LimitSet, Project } from '@overtally/contracts';
import { useForm } from 'react-hook-form';
import { FormField } from '../../../components/form-field.js';
import { FormProblem } from '../../../components/form-problem.js';
import { notifyDone } from '../../../components/notify.js';
import { Section } from '../../../components/section.js';
import { setFormProblem } from '../../../lib/form-errors.js';
import { useUpdateProject } from '../hooks/use-update-project.js';
import { projectFormSchema, toForm, toUpdate } from '../settings-form-values.js';
import { AnalysisDefaults } from './analysis-defaults.js';

interface ProjectSettingsFormProps {
  project: Project;
  limitSets: readonly LimitSet[];
}

/** Name, customer, and how new recordings are analysed and compared. */
export function ProjectSettingsForm({ project, limitSets }: ProjectSettingsFormProps) {
  const form = useForm({ resolver: zodResolver(projectFormSchema), defaultValues: toForm(project) });
  const { errors, isDirty } = form.formState;
  const update = useUpdateProject(project.id);
  const save = form.handleSubmit((values) =>
    update.mutate(toUpdate(project, values), {
      onSuccess: (saved) => {
        form.reset(toForm(saved));
        notifyDone('Project saved');
      },
      onError: (error) => setFormProblem(form, error),
    }),
  );
  return (
    <form noValidate onSubmit={save}>
      <Section title="Project">
        <Stack gap="4" maxW="lg">
          <FormField label="Name" error={errors.name?.message}>
            <Input autoComplete="off" {...form.register('name')} />
          </FormField>
          <FormField
            label="Customer"
            optional
            error={errors.customer?.message}
            help="For whom the work is done."
          >
            <Input autoComplete="off" {...form.register('customer')} />
          </FormField>
          <FormField
            label="Customer's address"
            optional
            error={errors.customerContact?.message}
            help="And how to reach them; reports print it."
          >
            <Textarea rows={2} {...form.register('customerContact')} />
          </FormField>
          <FormField label="Description" optional error={errors.description?.message}>
            <Textarea rows={4} {...form.register('description')} />
          </FormField>
        </Stack>
      </Section>
      <AnalysisDefaults form={form} limitSets={limitSets} />
      <Section title="Who issues reports">
        <label>
          <Flex as="span" gap="3" align="flex-start" maxW="lg">
            <input type="checkbox" {...form.register('preparerMayIssue')} />
            <Box as="span">
              Who prepared a report may issue it too
              <Text as="span" display="block" color="inkSoft" fontSize="13px">
                Otherwise another manager looks at each report before it goes out. Allow this only where the
                laboratory has nobody else; each report issued so says that one person prepared and issued it.
              </Text>
            </Box>
          </Flex>
        </label>
      </Section>
      <Stack gap="3" align="flex-start" mb="10">
        <FormProblem message={errors.root?.message} />
        <Button type="submit" variant="solid" loading={update.isPending} disabled={!isDirty}>
          Save project
        </Button>
      </Stack>
    </form>
  );
}
