'use client';
import { Toast } from '@base-ui/react/toast';
import { buttonClasses } from './button';
import { Icon } from './icon';

/*
 * Only for what may vanish ("Copied"). Whatever must be kept stands on the page in a Notice.
 * This is Base UI's toast: the other pinned library writes a style element without a nonce, which the
 * content security policy refuses.
 */
const manager = Toast.createToastManager();

/** Says a passing thing to eyes and to screen readers, and for a while offers to undo it; call it from any client component. */
export const say = (text: string, undo?: () => void): void => {
  if (!undo) return void manager.add({ title: text, timeout: 5000 });
  const id = manager.add({ title: text, timeout: 12_000, actionProps: { children: 'Undo', onClick: () => { undo(); manager.close(id); } } });
};

function Toasts() {
  const { toasts } = Toast.useToastManager();
  return toasts.map((toast) => (
    <Toast.Root key={toast.id} toast={toast} className="flex items-center gap-3 rounded border border-control bg-sheet py-2 pr-2 pl-4 text-ui text-ink">
      {/* To a screen reader this is a small dialog, and the sentence is its name; a heading it is not. */}
      <Toast.Title render={<p />} className="min-w-0 flex-1" />
      {toast.actionProps && <Toast.Action className={buttonClasses('plain', 'low')} />}
      <Toast.Close aria-label="Close" className="grid size-8 place-items-center text-ink-2 hover:text-ink"><Icon name="close" className="size-3" /></Toast.Close>
    </Toast.Root>
  ));
}

export function Toaster() {
  return (
    <Toast.Provider toastManager={manager} limit={3}>
      <Toast.Portal>
        <Toast.Viewport className="fixed right-4 bottom-4 z-50 grid w-[min(360px,calc(100vw-32px))] gap-2">
          <Toasts />
        </Toast.Viewport>
      </Toast.Portal>
    </Toast.Provider>
  );
}
