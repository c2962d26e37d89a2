import { Grid, Input } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { formatSi } from '../../../lib/format.js';
import type { faultsOf, ImportDraft } from './import-draft.js';

interface DialectFieldsProps {
  draft: ImportDraft;
  faults: ReturnType<typeof faultsOf>;
  preview: ImportPreview | null;
  needsSampleRate: boolean;
  onChange: (change: Partial<ImportDraft>) => void;
}

const delimiters: Record<string, string> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  ' ': 'space',
  '|': 'bar',
};
const decimals: Record<string, string> = { '.': 'point', ',': 'comma' };
const timeUnits: Record<string, string> = { s: 's', ms: 'ms', us: 'µs', ns: 'ns' };

const detected = (word: string | undefined) => (word ? `as detected (${word})` : 'as detected');

function choices(words: Record<string, string>, found: string | null | undefined) {
  return [
    { value: '', label: detected(found ? (words[found] ?? found) : undefined) },
    ...Object.entries(words).map(([value, label]) => ({ value, label })),
  ];
}

/** How the text is to be taken apart, and where the time comes from. Other formats have at most the sample rate, WAV not even that. */
export function DialectFields({ draft, faults, preview, needsSampleRate, onChange }: DialectFieldsProps) {
  if (preview?.format === 'wav') return null;
  const isTable = (preview?.format ?? 'csv') === 'csv';
  const timeName = preview?.columns.find((column) => column.index === preview.timeColumn)?.name;
  return (
    <Grid templateColumns={{ base: '1fr 1fr', md: 'repeat(3, 1fr)' }} gap="3">
      <FormField
        label="Sample rate in Hz"
        help={needsSampleRate ? 'The file does not say it.' : 'Only where the file does not say it.'}
        error={
          faults.sampleRateHz ??
          (needsSampleRate && !draft.sampleRateHz ? 'Needed to read this file' : undefined)
        }
      >
        <Input
          inputMode="decimal"
          placeholder={preview?.sampleRateHz ? formatSi(preview.sampleRateHz, 'Hz', { trim: true }) : ''}
          value={draft.sampleRateHz}
          autoFocus={needsSampleRate}
          onChange={(event) => onChange({ sampleRateHz: event.target.value })}
        />
      </FormField>
      {isTable ? (
        <>
          <FormField label="Time column">
            <SelectInput
              options={[
                { value: '', label: detected(timeName ?? (preview ? 'none' : undefined)) },
                { value: 'none', label: 'none' },
                ...(preview?.columns ?? []).map(({ index, name }) => ({ value: String(index), label: name })),
              ]}
              value={draft.timeColumn}
              onChange={(event) => onChange({ timeColumn: event.target.value })}
            />
          </FormField>
          <FormField label="Time unit">
            <SelectInput
              options={choices(timeUnits, preview?.timeUnit)}
              value={draft.timeUnit}
              onChange={(event) => onChange({ timeUnit: event.target.value })}
            />
          </FormField>
          <FormField label="Delimiter">
            <SelectInput
              options={choices(delimiters, preview?.delimiter)}
              value={draft.delimiter}
              onChange={(event) => onChange({ delimiter: event.target.value })}
            />
          </FormField>
          <FormField label="Decimal mark">
            <SelectInput
              options={choices(decimals, preview?.decimal)}
              value={draft.decimal}
              onChange={(event) => onChange({ decimal: event.target.value })}
            />
          </FormField>
          <FormField label="Lines before the numbers" error={faults.headerRows}>
            <Input
              inputMode="numeric"
              placeholder={preview?.headerRows === null ? '' : String(preview?.headerRows ?? '')}
              value={draft.headerRows}
              onChange={(event) => onChange({ headerRows: event.target.value })}
            />
          </FormField>
        </>
      ) : null}
    </Grid>
  );
}
