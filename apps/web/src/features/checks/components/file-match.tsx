import { Box, Button, Text } from '@chakra-ui/react';
import { useMutation } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { useDropzone } from 'react-dropzone';
import { StatusMark } from '../../../components/status-mark.js';
import { problemText } from '../../../lib/api-problem.js';
import { digestFile } from '../../../lib/digest/digest-file.js';
import { formatBytes } from '../../../lib/format.js';

/** Compares a PDF of the reader with the one that was issued. It is hashed here and sent nowhere. */
export function FileMatch({ sha256 }: { sha256: string }) {
  const stop = useRef<AbortController | null>(null);
  useEffect(() => () => stop.current?.abort(), []);
  const digest = useMutation({
    mutationFn: (file: File) => {
      stop.current?.abort();
      stop.current = new AbortController();
      return digestFile(file, stop.current.signal);
    },
  });
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    multiple: false,
    noClick: true,
    noKeyboard: true,
    onDropAccepted: ([file]) => {
      if (file) digest.mutate(file);
    },
  });
  return (
    <Box
      {...getRootProps()}
      as="section"
      aria-label="Compare a file"
      borderWidth="1px"
      borderStyle="dashed"
      borderColor={isDragActive ? 'act' : 'edge'}
      bg={isDragActive ? 'wash' : undefined}
      borderRadius="3px"
      px="4"
      py="4"
    >
      <input {...getInputProps({ 'aria-label': 'PDF to compare' })} />
      <Text fontWeight="600">Is your file the one that was issued?</Text>
      <Text color="inkSoft" mb="3" maxW="62ch">
        Drop the PDF here or choose it. It does not leave this browser: its SHA-256 is worked out here and
        compared with the one above.
      </Text>
      <Button onClick={open} loading={digest.isPending} loadingText="Reading the file">
        Choose the PDF
      </Button>
      <Box role="status" mt={digest.isIdle ? '0' : '4'}>
        {digest.isError ? <StatusMark tone="over">{problemText(digest.error)}</StatusMark> : null}
        {digest.isSuccess ? <Finding file={digest.variables} found={digest.data} wanted={sha256} /> : null}
      </Box>
    </Box>
  );
}

function Finding({ file, found, wanted }: { file: File; found: string; wanted: string }) {
  const isSame = found === wanted;
  return (
    <>
      <StatusMark tone={isSame ? 'within' : 'over'}>
        {isSame ? 'It matches byte for byte.' : 'It is not the file that was issued.'}
      </StatusMark>
      <Text color="inkSoft" fontSize="13px" mt="1" overflowWrap="anywhere">
        {file.name}, {formatBytes(file.size)}, SHA-256{' '}
        <Box as="span" fontFamily="mono">
          {found}
        </Box>
        {isSame
          ? '.'
          : '. It was changed since, printed or saved anew, or is another report or revision. Do not rely on it; ask the laboratory for the issued one.'}
      </Text>
    </>
  );
}
