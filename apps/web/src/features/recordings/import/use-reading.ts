import type { ImportOptions, ReadingRule, Recording } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { readingRulesQuery } from '../api/list-reading-rules.js';
import { draftOf, faultsOf, hasFaults, optionsOf, type ImportDraft } from './import-draft.js';
import { useImportPreview, type PreviewSource } from './use-import-preview.js';

/** A reading rule by its name; `id` is null once it is deleted. */
export type RuleRef = NonNullable<Recording['readingRule']>;

interface Reading {
  draft: ImportDraft;
  /** Rule that the settings came from, whether or not they were changed since. */
  rule: RuleRef | null;
}

/** Pause in typing after which the file is looked into anew, in ms. */
const pause = 300;

const same = (a: ImportOptions, b: ImportOptions) => JSON.stringify(a) === JSON.stringify(b);

/**
 * The settings of the import form, the rule they came from, and what reading the file by them gives. Nothing is
 * settled at first (`begin` null): the server then reads by the rule that fits the file, and its settings are taken.
 */
export function useReading(projectId: string, source: PreviewSource | undefined, begin: Reading | null) {
  const [edited, setEdited] = useState(begin);
  const asked = useAsked(edited?.draft ?? null);
  const rules = useQuery(readingRulesQuery(projectId));
  // Two previews: one without channels, in which every column stands, so that each can be kept or not whatever is
  // chosen now; and one of the channels as they will be read. While no column is touched they are the same.
  const layout = useImportPreview(
    projectId,
    source,
    asked && optionsOf({ ...asked, columns: {}, listed: false }, null),
  );
  const file = layout.data ?? null;
  const read = useImportPreview(projectId, source, asked && optionsOf(asked, file));
  const current: Reading = edited ?? {
    draft: draftOf(layout.data?.options ?? {}),
    rule: layout.data?.readingRule ?? null,
  };
  const options = optionsOf(current.draft, file);
  const rule = rules.data?.find(({ id }) => id === current.rule?.id) ?? null;
  const isChanged = rule !== null && !same(options, optionsOf(draftOf(rule.options), file));
  return {
    draft: current.draft,
    options,
    /** The file as it lies there: all its lines, rows and columns. */
    layout,
    /** The file as it will be read: its channels, doubts and problem. */
    read,
    rules,
    rule: current.rule,
    /** The rule itself, where it is still there. */
    storedRule: rule,
    /** True when the settings are no longer those of the rule. */
    isChanged,
    /** True when the rule was found by the server and nothing was touched since. */
    isFound: edited === null && current.rule !== null,
    change: (part: Partial<ImportDraft>) => setEdited({ ...current, draft: { ...current.draft, ...part } }),
    /** Reads by a rule, or as everything is found in the file. */
    readBy: (chosen: ReadingRule | null) =>
      setEdited({
        draft: draftOf(chosen?.options ?? {}),
        rule: refOf(chosen),
      }),
    /** Says where the settings, which stay, belong to. */
    belongTo: (chosen: RuleRef | null) => setEdited({ ...current, rule: refOf(chosen) }),
  };
}

const refOf = (rule: RuleRef | null): RuleRef | null => rule && { id: rule.id, name: rule.name };

export type UsedReading = ReturnType<typeof useReading>;

/** The form a moment after each change, passing over what cannot be asked. */
function useAsked(draft: ImportDraft | null): ImportDraft | null {
  const [asked, setAsked] = useState(draft);
  useEffect(() => {
    if (draft === null || hasFaults(faultsOf(draft))) return;
    const timer = setTimeout(() => setAsked(draft), pause);
    return () => clearTimeout(timer);
  }, [draft]);
  return asked;
}
