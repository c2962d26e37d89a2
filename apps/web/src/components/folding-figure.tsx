import { Button } from '@chakra-ui/react';
import { useState, type ReactNode } from 'react';
import { FigureFrame } from './figure-frame.js';

interface FoldingFigureProps {
  title: string;
  /** What is worth knowing of it while it is closed. */
  subtitle: ReactNode;
  /** Toggles of the opened figure. */
  toggles?: ReactNode;
  table?: ReactNode;
  children: ReactNode;
}

/** A figure that is opened on request, so that a sheet stays short. */
export function FoldingFigure({ title, subtitle, toggles, table, children }: FoldingFigureProps) {
  const [open, setOpen] = useState(false);
  return (
    <FigureFrame
      title={title}
      subtitle={subtitle}
      table={open ? table : undefined}
      toggles={
        <>
          {open ? toggles : null}
          <Button
            size="xs"
            variant="ghost"
            aria-expanded={open}
            aria-label={`${open ? 'Close' : 'Open'} ${title}`}
            onClick={() => setOpen(!open)}
          >
            {open ? 'Close' : 'Open'}
          </Button>
        </>
      }
    >
      {open ? children : null}
    </FigureFrame>
  );
}
