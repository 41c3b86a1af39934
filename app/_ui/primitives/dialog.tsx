'use client';
import { Dialog as Base } from '@base-ui/react/dialog';
import type { ReactElement, ReactNode } from 'react';
import { buttonClasses } from './button';
import { classes } from './classes';
import { Icon } from './icon';

export interface DialogProps {
  readonly title: string;
  readonly description?: ReactNode;
  readonly children: ReactNode;
  /** Buttons at the foot; the last one is the act, `DialogClose` takes one back. */
  readonly actions?: ReactNode;
  /** A button element that opens it; or steer it with `open` and `onOpenChange`. */
  readonly trigger?: ReactElement<Record<string, unknown>>;
  readonly open?: boolean;
  readonly onOpenChange?: (open: boolean) => void;
  /** `end`: a drawer at the right edge, which keeps the page in sight. */
  readonly side?: 'centre' | 'end';
}

const places = {
  centre: 'top-1/2 left-1/2 max-h-[calc(100dvh-32px)] w-[min(560px,calc(100vw-32px))] -translate-x-1/2 -translate-y-1/2 rounded border',
  end: 'inset-y-0 right-0 w-[min(520px,100vw)] border-l',
} as const;

export function Dialog({ title, description, children, actions, trigger, open, onOpenChange, side = 'centre' }: DialogProps) {
  return (
    <Base.Root open={open} onOpenChange={onOpenChange ? (next) => onOpenChange(next) : undefined}>
      {trigger && <Base.Trigger render={trigger} />}
      <Base.Portal>
        <Base.Backdrop className="fixed inset-0 z-30 bg-veil transition-opacity duration-quick data-ending-style:opacity-0 data-starting-style:opacity-0" />
        <Base.Popup className={classes('fixed z-40 flex flex-col overflow-hidden border-control bg-sheet text-ink transition-opacity duration-quick data-ending-style:opacity-0 data-starting-style:opacity-0', places[side])}>
          <div className="flex items-start gap-4 px-6 pt-5 pb-3">
            <Base.Title className="font-serif text-h3 font-semibold">{title}</Base.Title>
            <Base.Close className={buttonClasses('quiet', 'low', '-mt-1 -mr-2 ml-auto')} aria-label="Close"><Icon name="close" /></Base.Close>
          </div>
          <div className="min-h-0 flex-1 overflow-y-auto px-6 pb-5">
            {description && <Base.Description className="mb-3 max-w-measure text-ui text-ink-2">{description}</Base.Description>}
            {children}
          </div>
          {actions && <div className="flex flex-wrap justify-end gap-2 border-t border-hair px-6 py-4">{actions}</div>}
        </Base.Popup>
      </Base.Portal>
    </Base.Root>
  );
}

export const Drawer = (props: Omit<DialogProps, 'side'>) => <Dialog {...props} side="end" />;

export const DialogClose = ({ children = 'Back' }: { readonly children?: ReactNode }) => <Base.Close className={buttonClasses('quiet')}>{children}</Base.Close>;
