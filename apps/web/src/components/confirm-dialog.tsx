import { Button } from '@chakra-ui/react';
import { useRef, type ReactNode } from 'react';
import { Modal } from './modal.js';

interface ConfirmDialogProps {
  open: boolean;
  onClose: () => void;
  title: string;
  /** What will happen, and whether it can be taken back. */
  children: ReactNode;
  /** Names the act: "Remove Ada", not "OK". */
  confirmLabel: string;
  onConfirm: () => void;
  pending?: boolean;
  /** For what takes something away. */
  destructive?: boolean;
}

/** Asks before something that others notice. The focus begins on the way back. */
export function ConfirmDialog({
  open,
  onClose,
  title,
  children,
  confirmLabel,
  onConfirm,
  pending = false,
  destructive = false,
}: ConfirmDialogProps) {
  const cancel = useRef<HTMLButtonElement>(null);
  return (
    <Modal
      open={open}
      onClose={onClose}
      title={title}
      role="alertdialog"
      initialFocus={() => cancel.current}
      footer={
        <>
          <Button ref={cancel} onClick={onClose}>
            Cancel
          </Button>
          <Button
            variant="solid"
            colorPalette={destructive ? 'over' : 'act'}
            loading={pending}
            onClick={onConfirm}
          >
            {confirmLabel}
          </Button>
        </>
      }
    >
      {children}
    </Modal>
  );
}
