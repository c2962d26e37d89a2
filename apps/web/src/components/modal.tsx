import { CloseButton, Dialog, Portal } from '@chakra-ui/react';
import type { ReactNode } from 'react';

interface ModalProps {
  open: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
  footer?: ReactNode;
  size?: 'sm' | 'md' | 'lg' | 'xl' | 'wide';
  role?: 'dialog' | 'alertdialog';
  initialFocus?: () => HTMLElement | null;
}

/** A dialog over the page. Escape and the close button leave it; the focus returns to where it was. */
export function Modal({
  open,
  onClose,
  title,
  children,
  footer,
  size = 'md',
  role,
  initialFocus,
}: ModalProps) {
  return (
    <Dialog.Root
      open={open}
      onOpenChange={(details) => (details.open ? undefined : onClose())}
      size={size === 'wide' ? 'xl' : size}
      role={role ?? 'dialog'}
      initialFocusEl={initialFocus}
      lazyMount
      unmountOnExit
    >
      <Portal>
        <Dialog.Backdrop />
        <Dialog.Positioner>
          <Dialog.Content maxW={size === 'wide' ? '6xl' : undefined}>
            <Dialog.Header>
              <Dialog.Title>{title}</Dialog.Title>
            </Dialog.Header>
            <Dialog.Body>{children}</Dialog.Body>
            {footer ? <Dialog.Footer>{footer}</Dialog.Footer> : null}
            <Dialog.CloseTrigger asChild>
              <CloseButton size="sm" variant="ghost" colorPalette="gray" aria-label="Close" />
            </Dialog.CloseTrigger>
          </Dialog.Content>
        </Dialog.Positioner>
      </Portal>
    </Dialog.Root>
  );
}
