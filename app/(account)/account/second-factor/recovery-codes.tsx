'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';

export const codesIn = (value: Readonly<Record<string, unknown>>): readonly string[] => {
  const codes = value['backupCodes'];
  return Array.isArray(codes) ? codes.map(String) : [];
};

/** Shown while this page is open and never again. */
export function RecoveryCodes({ codes, next }: { readonly codes: readonly string[]; readonly next: string }) {
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  const copy = () => navigator.clipboard.writeText(codes.join('\n')).then(() => setCopied('yes'), () => setCopied('refused'));
  return (
    <div className="grid gap-4">
      <Notice kind="ask" word="Keep these" live="status">The second factor is on. These ten recovery codes are shown once: print them or keep them where your passwords are, and not on the telephone that shows the codes.</Notice>
      <ul aria-label="Recovery codes" className="grid grid-cols-2 gap-x-6 gap-y-1 font-code text-code">
        {codes.map((code) => <li key={code}>{code}</li>)}
      </ul>
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => void copy()}>{copied === 'yes' ? 'Copied' : 'Copy them'}</Button>
        <LinkButton href={next} tone="main" external>I have kept them; go on</LinkButton>
      </div>
      {copied === 'refused' && <p className="text-small">The browser does not let this page copy. Select the codes and copy them by keyboard.</p>}
    </div>
  );
}
