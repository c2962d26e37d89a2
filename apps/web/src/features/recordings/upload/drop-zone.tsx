import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { useRef, type ChangeEvent } from 'react';
import { useDropzone } from 'react-dropzone';
import { notifyProblem } from '../../../components/notify.js';
import { formatBytes } from '../../../lib/format.js';

interface DropZoneProps {
  onFiles: (files: readonly File[]) => void;
  /** Largest file that the server takes; null while it is not known. */
  maxFileBytes: number | null;
  /** Opens the import form for each file before it is sent. */
  checkFirst: boolean;
  onCheckFirst: (checkFirst: boolean) => void;
}

/** Where captures and folders of them are dropped or chosen. Any file is taken: its content decides, not its name. */
export function DropZone({ onFiles, maxFileBytes, checkFirst, onCheckFirst }: DropZoneProps) {
  const folderInput = useRef<HTMLInputElement>(null);
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    onDrop: onFiles,
    onError: (error) => notifyProblem('What was dropped could not be opened', error),
    noClick: true,
    noKeyboard: true,
  });
  const takeFolder = ({ currentTarget }: ChangeEvent<HTMLInputElement>) => {
    onFiles([...(currentTarget.files ?? [])]);
    // The same folder chosen again is a change too.
    currentTarget.value = '';
  };
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
        <input
          ref={folderInput}
          type="file"
          multiple
          webkitdirectory=""
          aria-label="Folder of captures"
          style={{ display: 'none' }}
          onChange={takeFolder}
        />
        <Text>
          Drop captures, folders or ZIP archives here: CSV, WAV, NumPy (.npy), COMTRADE (.cff, or .cfg with
          .dat)
          {maxFileBytes === null ? '' : `, up to ${formatBytes(maxFileBytes)} each`}. Sources are kept byte
          for byte.
        </Text>
        <Text fontSize="xs" color="inkSoft">
          Captures on mains: qualified persons, rated probes, isolation. Local codes decide.
        </Text>
      </Box>
      <Flex align="center" columnGap="4" rowGap="2" wrap="wrap">
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
        <Flex gap="2">
          <Button onClick={() => folderInput.current?.click()}>Choose folder</Button>
          <Button variant="solid" onClick={open}>
            Add recordings
          </Button>
        </Flex>
      </Flex>
    </Flex>
  );
}
