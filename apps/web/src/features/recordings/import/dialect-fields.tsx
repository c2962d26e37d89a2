import { Grid, Input } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { formatSi } from '../../../lib/format.js';
import { decimalWords, delimiterWords, timeUnitWords } from '../rules/options-words.js';
import { columnKey, timeIndex, type ImportDraft, type ImportFaults } from './import-draft.js';

interface DialectFieldsProps {
  draft: ImportDraft;
  faults: ImportFaults;
  preview: ImportPreview | null;
  needsSampleRate: boolean;
  onChange: (change: Partial<ImportDraft>) => void;
}

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
                ...(preview?.columns ?? []).map(({ index, name }) => ({
                  value: columnKey(index),
                  label: name,
                })),
              ]}
              value={timeChoice(draft, preview)}
              onChange={(event) => onChange({ timeColumn: event.target.value })}
            />
          </FormField>
          <FormField label="Time unit">
            <SelectInput
              options={choices(timeUnitWords, preview?.timeUnit)}
              value={draft.timeUnit}
              onChange={(event) => onChange({ timeUnit: event.target.value })}
            />
          </FormField>
          <FormField label="Delimiter">
            <SelectInput
              options={choices(delimiterWords, preview?.delimiter)}
              value={draft.delimiter}
              onChange={(event) => onChange({ delimiter: event.target.value })}
            />
          </FormField>
          <FormField label="Decimal mark">
            <SelectInput
              options={choices(decimalWords, preview?.decimal)}
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

/** Options may name the time column by its name; the list has it by its place. */
function timeChoice(draft: ImportDraft, preview: ImportPreview | null): string {
  if (!draft.timeColumn.startsWith('=') || !preview) return draft.timeColumn;
  const index = timeIndex(draft, preview);
  return index === null ? '' : columnKey(index);
}
