import { Box, Button, chakra, Flex, Input, Text } from '@chakra-ui/react';
import { memo, useCallback, useState, type DragEvent } from 'react';
import type { DraftStage } from '../draft.js';
import { kindWords, stageMeaning, stageName } from '../stages/stage-words.js';
import type { Edit } from './open-fields.js';
import { SpecFields } from './spec-fields.js';

export interface StageActs {
  change: (key: number, stage: Partial<DraftStage>) => void;
  editSpec: (key: number, edit: (spec: DraftStage['spec']) => DraftStage['spec'], isSliding: boolean) => void;
  move: (key: number, to: number) => void;
  duplicate: (key: number) => void;
  remove: (key: number) => void;
}

interface StageCardProps {
  stage: DraftStage;
  index: number;
  count: number;
  acts: StageActs;
  disabled: boolean;
}

const dragType = 'application/x-study-stage';

/** One stage of the cascade: its values, whether it is on, and its place. */
export const StageCard = memo(function StageCard({ stage, index, count, acts, disabled }: StageCardProps) {
  const { key, isOn, spec } = stage;
  const name = stageName(stage);
  const [isTarget, setIsTarget] = useState(false);
  const onEdit = useCallback<Edit<DraftStage['spec']>>(
    (edit, isSliding = false) => acts.editSpec(key, edit, isSliding),
    [acts, key],
  );
  const drop = (event: DragEvent) => {
    const moved = Number(event.dataTransfer.getData(dragType));
    setIsTarget(false);
    if (event.dataTransfer.types.includes(dragType) && moved !== key) acts.move(moved, index);
  };
  const small = { size: 'xs', variant: 'ghost', px: '1.5', minW: '6' } as const;
  return (
    <Box
      as="li"
      listStyleType="none"
      borderTopWidth={isTarget ? '3px' : '1px'}
      borderColor={isTarget ? 'act' : 'rule'}
      py="3"
      opacity={isOn ? 1 : 0.75}
      onDragOver={(event: DragEvent) => {
        if (!event.dataTransfer.types.includes(dragType)) return;
        event.preventDefault();
        setIsTarget(true);
      }}
      onDragLeave={() => setIsTarget(false)}
      onDrop={drop}
    >
      <Flex align="center" gap="1" mb="1">
        {disabled ? null : (
          <chakra.span
            draggable
            aria-hidden="true"
            title="Drag to another place"
            cursor="grab"
            color="inkSoft"
            px="1"
            userSelect="none"
            onDragStart={(event) => event.dataTransfer.setData(dragType, String(key))}
          >
            ⠿
          </chakra.span>
        )}
        <Text as="h3" fontWeight="600" fontSize="sm" flex="1" minW="0" overflowWrap="anywhere">
          {`${index + 1}. ${name}`}
        </Text>
        <chakra.label display="flex" alignItems="center" gap="1.5" fontSize="13px" minH="24px">
          <chakra.input
            type="checkbox"
            accentColor="var(--chakra-colors-act)"
            checked={isOn}
            disabled={disabled}
            aria-label={`${name} is on`}
            onChange={(event) => acts.change(key, { isOn: event.target.checked })}
          />
          On
        </chakra.label>
      </Flex>
      <Text fontSize="xs" color="inkSoft" mb="2">
        {stageMeaning(spec)}
      </Text>
      <SpecFields spec={spec} stage={`stage ${index + 1}`} disabled={disabled} onEdit={onEdit} />
      {disabled ? null : (
        <Flex mt="2" gap="0.5" wrap="wrap" align="center">
          <Input
            size="xs"
            flex="1"
            minW="24"
            maxLength={80}
            placeholder={kindWords(spec)}
            aria-label={`Own name of stage ${index + 1}`}
            defaultValue={stage.name}
            onBlur={(event) => acts.change(key, { name: event.target.value.trim() })}
          />
          <Button
            {...small}
            aria-label={`Move ${name} up`}
            disabled={index === 0}
            onClick={() => acts.move(key, index - 1)}
          >
            ↑
          </Button>
          <Button
            {...small}
            aria-label={`Move ${name} down`}
            disabled={index === count - 1}
            onClick={() => acts.move(key, index + 1)}
          >
            ↓
          </Button>
          <Button {...small} aria-label={`Duplicate ${name}`} onClick={() => acts.duplicate(key)}>
            Duplicate
          </Button>
          <Button {...small} aria-label={`Remove ${name}`} onClick={() => acts.remove(key)}>
            Remove
          </Button>
        </Flex>
      )}
    </Box>
  );
});
