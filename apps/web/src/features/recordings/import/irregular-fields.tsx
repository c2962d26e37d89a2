import { Grid } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { missingWords, unevenWords } from '../rules/options-words.js';
import type { ImportDraft } from './import-draft.js';

interface IrregularFieldsProps {
  draft: ImportDraft;
  preview: ImportPreview;
  onChange: (change: Partial<ImportDraft>) => void;
}

const missingHelp: Record<string, string> = {
  keep: 'They stay missing and are counted; an analysis takes a span without them.',
  interpolate: 'A straight line between the numbers on both sides takes their place; they are counted.',
  refuse: 'A file with such a cell is not read; its line is named.',
};

const unevenHelp: Record<string, string> = {
  resample: 'The values are brought to even steps of time, and it is noted how.',
  'take-as-even': 'The stamps are passed over. Right where only the clock that wrote them wavered.',
  refuse: 'A file with such stamps is not read; the first place is named.',
};

const usual = (words: Record<string, string>, choice: string) => [
  { value: '', label: `as usual (${words[choice]})` },
  ...Object.entries(words).map(([value, label]) => ({ value, label })),
];

/** What is done where numbers are missing or time stamps are uneven, for formats that can have either. */
export function IrregularFields({ draft, preview, onChange }: IrregularFieldsProps) {
  if (preview.format !== 'csv' && preview.format !== 'comtrade') return null;
  const hasStamps = preview.format === 'comtrade' || preview.timeColumn !== null;
  return (
    <Grid templateColumns={{ base: '1fr', md: '1fr 1fr' }} gap="3">
      <FormField label="Cells without a number" help={missingHelp[draft.missingValues || 'keep']}>
        <SelectInput
          options={usual(missingWords, 'keep')}
          value={draft.missingValues}
          onChange={(event) => onChange({ missingValues: event.target.value })}
        />
      </FormField>
      {hasStamps ? (
        <FormField label="Uneven time stamps" help={unevenHelp[draft.unevenTime || 'resample']}>
          <SelectInput
            options={usual(unevenWords, 'resample')}
            value={draft.unevenTime}
            onChange={(event) => onChange({ unevenTime: event.target.value })}
          />
        </FormField>
      ) : null}
    </Grid>
  );
}
