import { chakra, Stack, Text } from '@chakra-ui/react';
import type { ImportPreview } from '@overtally/contracts';

interface DoubtsProps {
  preview: Pick<ImportPreview, 'problem' | 'doubts'>;
  /** Lines that can be shown, from the first on. */
  lineCount: number;
  onLine: (line: number) => void;
}

/** What the reader is unsure of or refuses, with the place and the cure. Lines it names lead to the lines shown. */
export function Doubts({ preview, lineCount, onLine }: DoubtsProps) {
  const { problem } = preview;
  const doubts = preview.doubts.filter((doubt) => doubt !== problem?.message);
  if (!problem && doubts.length === 0) return null;
  const linked = (text: string) => <LinkedLines text={text} lineCount={lineCount} onLine={onLine} />;
  const place = [
    problem?.line === undefined || names(problem.message, problem.line) ? null : `line ${problem.line}`,
    problem?.column === undefined || problem.message.includes(`column ${problem.column}`)
      ? null
      : `column ${problem.column}`,
  ].filter(Boolean);
  return (
    <Stack gap="1" borderLeftWidth="3px" borderColor={problem ? 'over' : 'near'} pl="3" role="status">
      {problem ? (
        <Text>
          <strong>{linked(problem.message)}</strong>
          {place.length > 0 ? <> ({linked(place.join(', '))})</> : null} {linked(problem.cure)}
        </Text>
      ) : null}
      {doubts.map((doubt) => (
        <Text key={doubt}>{linked(doubt)}</Text>
      ))}
    </Stack>
  );
}

/** True where a sentence tells the line itself. */
const names = (text: string, line: number) => new RegExp(`\\bline ${line}\\b`, 'i').test(text);

/** A sentence in which “line 7” can be followed where that line is among those shown. */
function LinkedLines({ text, lineCount, onLine }: { text: string } & Omit<DoubtsProps, 'preview'>) {
  return text.split(/(\bline \d+)/i).map((part, index) => {
    const line = Number(/^line (\d+)$/i.exec(part)?.[1] ?? Number.NaN);
    if (!(line >= 1 && line <= lineCount)) return part;
    return (
      <chakra.button
        key={index}
        type="button"
        color="act"
        textDecoration="underline"
        textUnderlineOffset="3px"
        cursor="pointer"
        onClick={() => onLine(line)}
      >
        {part}
      </chakra.button>
    );
  });
}
