import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { useDropzone } from 'react-dropzone';

interface DropZoneProps {
  onFiles: (files: readonly File[]) => void;
  /** Opens the import form for each file before it is sent. */
  checkFirst: boolean;
  onCheckFirst: (checkFirst: boolean) => void;
}

/** Where captures are dropped or chosen. Any file is taken: its content decides, not its name. */
export function DropZone({ onFiles, checkFirst, onCheckFirst }: DropZoneProps) {
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    onDrop: onFiles,
    noClick: true,
    noKeyboard: true,
  });
  return (
    <Flex
      {...getRootProps()}
      as="section"
      aria-label="Add recordings"
      align="center"
      justify="space-between"
      gap="4"
      wrap="wrap"
      borderWidth="1px"
      borderStyle="dashed"
      borderColor={isDragActive ? 'act' : 'edge'}
      bg={isDragActive ? 'wash' : undefined}
      borderRadius="3px"
      px="4"
      py="3"
      mb="3"
    >
      <Box flex="1 1 320px">
        <input {...getInputProps({ 'aria-label': 'Capture files' })} />
        <Text>
          Drop captures here: CSV, WAV, NumPy (.npy) or COMTRADE (.cff). Sources are kept byte for byte.
        </Text>
        <Text fontSize="xs" color="inkSoft">
          Captures on mains: qualified persons, rated probes, isolation. Local codes decide.
        </Text>
      </Box>
      <Flex align="center" gap="4" wrap="wrap">
        <label>
          <Flex as="span" align="center" gap="2" fontSize="13px" color="inkSoft">
            <input
              type="checkbox"
              checked={checkFirst}
              onChange={(event) => onCheckFirst(event.target.checked)}
            />
            Check before reading
          </Flex>
        </label>
        <Button variant="solid" onClick={open}>
          Add recordings
        </Button>
      </Flex>
    </Flex>
  );
}
