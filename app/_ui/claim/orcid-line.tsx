import { orcidAddress } from '@/lib/kernel/orcid-id';

interface OrcidLineProps {
  readonly orcid: string;
  /** ORCID itself vouched for it at a sign-in; otherwise its owner typed it. */
  readonly authenticated: boolean;
}

/** The whole address as the link, and beside it in words whether it was proven. */
export const OrcidLine = ({ orcid, authenticated }: OrcidLineProps) => (
  <span className="text-ui">
    <a href={orcidAddress(orcid)} className="inline-flex min-h-8 items-center [overflow-wrap:anywhere]">{orcidAddress(orcid)}</a>{' '}
    <span className="text-ink-2">({authenticated ? 'authenticated' : 'typed in, not authenticated'})</span>
  </span>
);
