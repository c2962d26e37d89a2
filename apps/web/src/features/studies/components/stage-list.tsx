import { Box, Text } from '@chakra-ui/react';
import { useMemo } from 'react';
import { notifyDone } from '../../../components/notify.js';
import { withKey, withStages, type DraftStage } from '../draft.js';
import { newStage, stageName } from '../stages/stage-words.js';
import { useDraftPart, useStudyStore, type StudyStore } from '../study-store.js';
import { KindSelect } from './kind-select.js';
import { OutputFields } from './output-fields.js';
import { StageCard, type StageActs } from './stage-card.js';

const mostStages = 12;

/** The cascade, from input to output. */
export function StageList({ disabled }: { disabled: boolean }) {
  const store = useStudyStore();
  const stages = useDraftPart((draft) => draft.stages);
  const acts = useMemo(() => stageActs(store), [store]);
  return (
    <Box>
      {stages.length === 0 ? (
        <Text color="inkSoft" fontSize="13px" py="3">
          No stage yet: what comes in goes out. Add the first one below.
        </Text>
      ) : (
        <Box as="ol" aria-label="Stages in series">
          {stages.map((stage, index) => (
            <StageCard
              key={stage.key}
              stage={stage}
              index={index}
              count={stages.length}
              acts={acts}
              disabled={disabled}
            />
          ))}
        </Box>
      )}
      {disabled || stages.length >= mostStages ? null : (
        <Box borderTopWidth="1px" borderColor="rule" py="3">
          <KindSelect
            label="Kind of the next stage"
            word="Add stage"
            onChoose={(kind) =>
              store.change((draft) => withStages(draft, [...draft.stages, withKey(newStage(kind))]))
            }
          />
        </Box>
      )}
      <OutputFields disabled={disabled} />
    </Box>
  );
}

function stageActs(store: StudyStore): StageActs {
  const set = (edit: (stages: DraftStage[]) => DraftStage[]) =>
    store.change((draft) => withStages(draft, edit(draft.stages)));
  const replaced = (key: number, change: Partial<DraftStage>) => (stages: DraftStage[]) =>
    stages.map((stage) => (stage.key === key ? { ...stage, ...change } : stage));
  return {
    change: (key, change) => set(replaced(key, change)),
    editSpec: (key, edit, isSliding) =>
      (isSliding ? store.slide : store.change)((draft) =>
        withStages(
          draft,
          draft.stages.map((stage) => (stage.key === key ? { ...stage, spec: edit(stage.spec) } : stage)),
        ),
      ),
    move: (key, to) =>
      set((stages) => {
        const moved = stages.find((stage) => stage.key === key);
        return moved ? stages.filter((stage) => stage.key !== key).toSpliced(to, 0, moved) : stages;
      }),
    duplicate: (key) =>
      set((stages) => {
        const at = stages.findIndex((stage) => stage.key === key);
        const { key: _own, ...copy } = stages[at]!;
        return stages.length >= mostStages ? stages : stages.toSpliced(at + 1, 0, withKey(copy));
      }),
    remove: (key) => {
      const was = store.draft().stages;
      const at = was.findIndex((stage) => stage.key === key);
      const removed = was[at]!;
      set((stages) => stages.filter((stage) => stage.key !== key));
      notifyDone(`${stageName(removed)} removed`, () => set((stages) => stages.toSpliced(at, 0, removed)));
    },
  };
}
