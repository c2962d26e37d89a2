import { CloseButton, Flex, Portal, Stack, Toast, Toaster as ChakraToaster } from '@chakra-ui/react';
import { toaster } from './notify.js';

/** Where notices stand; render once. `notify.ts` creates them. */
export function Toaster() {
  return (
    <Portal>
      <ChakraToaster toaster={toaster} insetInline={{ mdDown: '4' }}>
        {(toast) => (
          <Toast.Root
            width={{ md: 'sm' }}
            bg="sheet"
            color="ink"
            borderWidth="1px"
            borderColor="ruleStrong"
            borderLeftWidth="3px"
            borderLeftColor={toast.type === 'error' ? 'over' : 'within'}
            borderRadius="3px"
          >
            <Stack gap="0.5" flex="1" maxW="100%">
              <Toast.Title>{toast.title}</Toast.Title>
              {toast.description ? (
                <Toast.Description color="inkSoft" opacity="1">
                  {toast.description}
                </Toast.Description>
              ) : null}
            </Stack>
            <Flex align="flex-start" gap="2">
              {toast.action ? (
                <Toast.ActionTrigger
                  color="act"
                  borderWidth="1px"
                  borderColor="edge"
                  borderRadius="3px"
                  px="2.5"
                  h="7"
                  cursor="pointer"
                >
                  {toast.action.label}
                </Toast.ActionTrigger>
              ) : null}
              <Toast.CloseTrigger asChild position="static">
                <CloseButton size="2xs" variant="ghost" colorPalette="gray" aria-label="Close the notice" />
              </Toast.CloseTrigger>
            </Flex>
          </Toast.Root>
        )}
      </ChakraToaster>
    </Portal>
  );
}
