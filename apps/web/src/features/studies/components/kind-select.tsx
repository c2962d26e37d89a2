import { Button, Flex, NativeSelect } from '@chakra-ui/react';
import { useState } from 'react';
import { stageGroups, stageWords, type StageKind } from '../stages/stage-words.js';

interface KindSelectProps {
  label: string;
  /** On the button. */
  word: string;
  /** A kind that cannot be taken here. */
  without?: StageKind;
  onChoose: (kind: StageKind) => void;
}

/** All kinds of stages by what they stand for, and the button that adds one. */
export function KindSelect({ label, word, without, onChoose }: KindSelectProps) {
  const [kind, setKind] = useState<StageKind>('lc-low-pass');
  return (
    <Flex gap="2">
      <NativeSelect.Root flex="1" minW="0">
        <NativeSelect.Field
          aria-label={label}
          value={kind}
          onChange={(event) => setKind(event.target.value as StageKind)}
        >
          {stageGroups.map((group) => (
            <optgroup key={group.label} label={group.label}>
              {group.kinds
                .filter((each) => each !== without)
                .map((each) => (
                  <option key={each} value={each}>
                    {stageWords[each]}
                  </option>
                ))}
            </optgroup>
          ))}
        </NativeSelect.Field>
        <NativeSelect.Indicator />
      </NativeSelect.Root>
      <Button onClick={() => onChoose(kind)}>{word}</Button>
    </Flex>
  );
}
