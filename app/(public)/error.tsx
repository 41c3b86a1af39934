'use client';
import { Button } from '../_ui/primitives/button';
import { ErrorState } from '../_ui/primitives/page-state';
import { LinkButton } from '../_ui/primitives/link-button';

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

/** The fault is ours: a reference, never a message from inside. */
export default function ErrorPage({ error, reset }: ErrorPageProps) {
  return (
    <div className="wrap max-w-[800px] pt-10">
      <ErrorState
        level={1}
        title="This page could not be put together"
        reference={error.digest ? `Reference ${error.digest}` : undefined}
        actions={<><Button tone="main" onClick={reset}>Try again</Button><LinkButton href="/register">Go to the register</LinkButton></>}
      >
        <p className="text-ink">The fault is on this side and has been written down. Nothing you saved is lost.</p>
      </ErrorState>
    </div>
  );
}
