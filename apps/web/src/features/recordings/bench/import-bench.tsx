import { Button, Flex, Stack, Text } from '@chakra-ui/react';
import { useState } from 'react';
import { Modal } from '../../../components/modal.js';
import { BenchFields } from './bench-fields.js';
import { benchSchema, emptyBench, type BenchValues } from './bench-values.js';
import type { useImportBench } from './use-import-bench.js';

interface ImportBenchProps {
  projectId: string;
  bench: ReturnType<typeof useImportBench>;
}

/** One line over the drop zone: what the captures that are dropped are of. */
export function ImportBench({ projectId, bench }: ImportBenchProps) {
  const [open, setOpen] = useState(false);
  const words = bench.names.join(', ') || 'conditions only';
  return (
    <Flex align="center" columnGap="3" rowGap="1" wrap="wrap" mb="2">
      <Text color={bench.isEmpty ? 'inkSoft' : undefined} fontSize="sm" overflowWrap="anywhere">
        {bench.isEmpty
          ? 'Nothing is said yet of equipment, measuring chain and conditions of new captures.'
          : `New captures are of: ${words}`}
      </Text>
      <Button size="xs" onClick={() => setOpen(true)}>
        {bench.isEmpty ? 'Say what they are of' : 'Change'}
      </Button>
      <Modal open={open} onClose={() => setOpen(false)} title="What new captures are of" size="xl">
        <ImportBenchForm projectId={projectId} bench={bench} onClose={() => setOpen(false)} />
      </Modal>
    </Flex>
  );
}

function ImportBenchForm({ projectId, bench, onClose }: ImportBenchProps & { onClose: () => void }) {
  const [values, setValues] = useState(bench.values);
  const issues = benchSchema.safeParse(values).error?.issues ?? [];
  const errors = Object.fromEntries(issues.map(({ path, message }) => [String(path[0]), message]));
  const keep = (next: BenchValues) => {
    bench.keep(next);
    onClose();
  };
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        if (issues.length === 0) keep(values);
      }}
    >
      <Stack gap="5">
        <Text color="inkSoft" fontSize="13px">
          Goes with every file that is dropped from now on, and is kept on this computer for the next time.
        </Text>
        <BenchFields projectId={projectId} values={values} errors={errors} onChange={setValues} />
        <Stack direction="row" justify="flex-end" gap="2">
          <Button onClick={() => keep(emptyBench)}>Say nothing</Button>
          <Button type="submit" variant="solid">
            Use for new captures
          </Button>
        </Stack>
      </Stack>
    </form>
  );
}
