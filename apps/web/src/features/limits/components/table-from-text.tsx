import { Box, Button, Stack, Text, Textarea } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { useDropzone } from 'react-dropzone';
import { FormField } from '../../../components/form-field.js';
import { tableFromText, type TableValues } from '../limit-set-form-values.js';

interface TableFromTextProps {
  /** Takes the table over, with what most of its limits refer to; null where they do not say. */
  onTable: (
    table: TableValues,
    reading: Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'> | null,
  ) => void;
}

const shownProblems = 5;
/** Far more than a table of 199 orders and five totals needs. */
const largestBytes = 100_000;

/** A table of limits out of a CSV file that is dropped or chosen, or out of what is pasted. */
export function TableFromText({ onTable }: TableFromTextProps) {
  const [text, setText] = useState('');
  const [refusal, setRefusal] = useState<string | null>(null);
  const read = useMemo(() => (text.trim() === '' ? null : tableFromText(text)), [text]);
  const take = async ([file]: readonly File[]) => {
    if (file === undefined) return;
    const isSmall = file.size <= largestBytes;
    setRefusal(isSmall ? null : `${file.name} is too large for a table of limits: give at most 100 kB`);
    if (isSmall) setText(await file.text());
  };
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    onDrop: (files) => void take(files),
    multiple: false,
    noClick: true,
    noKeyboard: true,
  });
  return (
    <Stack
      {...getRootProps()}
      as="section"
      aria-label="Limits from a file"
      gap="2"
      align="flex-start"
      w="full"
      maxW="lg"
      borderWidth="1px"
      borderStyle="dashed"
      borderColor={isDragActive ? 'act' : 'edge'}
      bg={isDragActive ? 'wash' : undefined}
      borderRadius="3px"
      p="4"
    >
      <input {...getInputProps({ 'aria-label': 'Limit table file' })} />
      <FormField
        label="From a CSV file or a spreadsheet"
        help="Drop a file here, or paste: order, limit, unit, cap in A on each line. Totals stand in lines such as THD,8,%,40."
      >
        <Textarea
          rows={7}
          fontFamily="mono"
          placeholder={'3,2.30,A\n15-39 odd,0.15*15/n,A\nTHD,8,%,40'}
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
      </FormField>
      <Problems refusal={refusal} read={read} />
      <Stack direction="row" gap="2" wrap="wrap">
        <Button size="xs" onClick={open}>
          Choose a file
        </Button>
        <Button
          size="xs"
          disabled={!read?.table}
          onClick={() => {
            if (!read?.table) return;
            onTable(read.table, read.reading);
            setText('');
          }}
        >
          {read?.table ? `Use ${orderCount(read.count)} in place of the rows` : 'Use these orders'}
        </Button>
      </Stack>
    </Stack>
  );
}

const orderCount = (count: number): string => (count === 1 ? '1 order' : `${count} orders`);

function Problems({
  refusal,
  read,
}: {
  refusal: string | null;
  read: ReturnType<typeof tableFromText> | null;
}) {
  const problems = read?.problems ?? [];
  if (refusal === null && problems.length === 0) return null;
  return (
    <Box role="alert" color="over" fontSize="13px">
      {refusal ? <Text>{refusal}</Text> : null}
      {problems.slice(0, shownProblems).map(({ line, column, message }) => (
        <Text key={`${line}:${column}`}>
          Line {line}, column {column}: {message}.
        </Text>
      ))}
      {problems.length > shownProblems ? <Text>and {problems.length - shownProblems} more</Text> : null}
    </Box>
  );
}
