import type { LimitSet } from '@overtally/contracts';
import { createContext, useContext, useSyncExternalStore } from 'react';
import { definitionOf, type StudyDraft } from './draft.js';
import { predict, type Prediction } from './predict.js';

type Change = (draft: StudyDraft) => StudyDraft;

/** The draft of a page and what follows from it. Parts of the page listen by themselves, so that a slider redraws curves only. */
export interface StudyStore {
  subscribe: (listener: () => void) => () => void;
  draft: () => StudyDraft;
  prediction: () => Prediction;
  limitSets: readonly LimitSet[];
  /** The set that the draft is judged by. */
  limitSet: () => LimitSet | null;
  /** Whether the draft says something else than at the start. */
  isChanged: () => boolean;
  change: (change: Change) => void;
  /** As `change`, at the next frame: of several before it, all apply and one redraw follows. */
  slide: (change: Change) => void;
}

export function createStudyStore(initial: StudyDraft, limitSets: readonly LimitSet[]): StudyStore {
  let draft = initial;
  let predicted: { of: StudyDraft; prediction: Prediction } | null = null;
  let waiting: Change[] = [];
  const first = JSON.stringify(definitionOf(initial));
  const listeners = new Set<() => void>();
  const limitSet = () => limitSets.find(({ id }) => id === draft.judgement?.limitSetId) ?? null;
  const change = (apply: Change) => {
    draft = apply(draft);
    for (const listener of [...listeners]) listener();
  };
  return {
    limitSets,
    limitSet,
    change,
    draft: () => draft,
    isChanged: () => draft !== initial && JSON.stringify(definitionOf(draft)) !== first,
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    prediction: () => {
      if (predicted?.of !== draft) predicted = { of: draft, prediction: predict(draft, limitSet()) };
      return predicted.prediction;
    },
    slide: (apply) => {
      waiting.push(apply);
      if (waiting.length > 1) return;
      requestAnimationFrame(() => {
        const all = waiting;
        waiting = [];
        change((current) => all.reduce((held, next) => next(held), current));
      });
    },
  };
}

export const StudyContext = createContext<StudyStore | null>(null);

export function useStudyStore(): StudyStore {
  const store = useContext(StudyContext);
  if (store === null) throw new Error('This part must stand inside a study');
  return store;
}

/** A part of the draft; renders anew only when it is another object or value. */
export function useDraftPart<T>(part: (draft: StudyDraft) => T): T {
  const store = useStudyStore();
  return useSyncExternalStore(store.subscribe, () => part(store.draft()));
}

export function usePrediction(): Prediction {
  const store = useStudyStore();
  return useSyncExternalStore(store.subscribe, store.prediction);
}

export function useIsChanged(): boolean {
  const store = useStudyStore();
  return useSyncExternalStore(store.subscribe, store.isChanged);
}

/** What kind of prediction there is, without its numbers. */
export function usePredictionKind(): Prediction['kind'] {
  const store = useStudyStore();
  return useSyncExternalStore(store.subscribe, () => store.prediction().kind);
}
