import { Progress } from '@chakra-ui/react';

/** How far something has come, 0 to 1. `held`: it does not move now. */
export function ThinProgress({
  label,
  share,
  held = false,
}: {
  label: string;
  share: number;
  held?: boolean;
}) {
  return (
    <Progress.Root
      value={Math.floor(100 * share)}
      size="xs"
      colorPalette="act"
      aria-label={label}
      opacity={held ? 0.5 : undefined}
    >
      <Progress.Track h="3px" bg="rule">
        <Progress.Range />
      </Progress.Track>
    </Progress.Root>
  );
}
