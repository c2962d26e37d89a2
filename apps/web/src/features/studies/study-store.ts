import type { LimitSet } from '@overtally/contracts';
import { createContext, useContext, useDeferredValue, useSyncExternalStore } from 'react';
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
  /** As `change`, once a frame: the first at once, those that come in the same frame together at its end. */
  slide: (change: Change) => void;
}

export function createStudyStore(initial: StudyDraft, limitSets: readonly LimitSet[]): StudyStore {
  let draft = initial;
  let predicted: { of: StudyDraft; prediction: Prediction } | null = null;
  let waiting: Change[] = [];
  let isHeld = false;
  const first = JSON.stringify(definitionOf(initial));
  const listeners = new Set<() => void>();
  const limitSet = () => limitSets.find(({ id }) => id === draft.judgement?.limitSetId) ?? null;
  const change = (apply: Change) => {
    draft = apply(draft);
    for (const listener of [...listeners]) listener();
  };
  /** At the end of a frame: what came in it is applied, and holds the next one. */
  const release = () => {
    const all = waiting;
    waiting = [];
    isHeld = all.length > 0;
    if (!isHeld) return;
    change((current) => all.reduce((held, next) => next(held), current));
    requestAnimationFrame(release);
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
      if (isHeld) {
        waiting.push(apply);
        return;
      }
      isHeld = true;
      change(apply);
      requestAnimationFrame(release);
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

/** The stages for parts that may follow a moving slider late. */
export function useLateStages(): StudyDraft['stages'] {
  return useDeferredValue(useDraftPart(stagesOf));
}

const stagesOf = ({ stages }: StudyDraft) => stages;
