import { Card } from '@/app/_ui/primitives/card';
import { Facts, Hash } from '@/app/_ui/primitives/facts';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import type { RecordView } from '@/lib/services/records/record-view';

interface AsideProps {
  readonly record: RecordView;
}

/** Files to take away; the browser downloads them as they were signed. */
export const RecordActions = ({ record }: AsideProps) => (
  <>
    <LinkButton href={record.links.bundle} download>Download the signed record</LinkButton>
    <LinkButton href={record.links.json} external tone="quiet">JSON</LinkButton>
    <LinkButton href={record.links.signature} external tone="quiet">Signature</LinkButton>
  </>
);

/** The badge, its one sentence, and how anyone checks it without asking us. */
export function BadgeCard({ record }: AsideProps) {
  const { badge, document, links } = record;
  return (
    <>
      <Card title="Badge">
        {/* An image of our own, drawn for this record; the sentence beside it says the same in words. */}
        {/* eslint-disable-next-line @next/next/no-img-element */}
        <img src={links.badge} alt={`Badge: ${badge.word}, level ${document.decision.level}`} className="mb-3 h-8 max-w-full" />
        <p className="text-ui">{badge.sentence}</p>
        <p className="mt-2 text-ui text-ink-2">{badge.coversLine}</p>
        <p className="mt-2 text-ui text-ink-2">{badge.meaning}</p>
      </Card>
      <Card title="Check it yourself">
        <p className="mb-3 text-ui text-ink-2">The signature covers every number above. With the signed record, the key and the files, the check needs no network and does not ask us.</p>
        <pre tabIndex={0} role="group" aria-label="Command that verifies this record" className="mb-3 overflow-x-auto border border-hair bg-page px-3 py-2">npm run verify -- counterfoil-{record.id}.signed.json --key counterfoil-{document.keyId}.pem</pre>
        <Facts facts={[['Key', <a key="key" href={links.key}>{document.keyId}</a>], ['Signed result', <Hash key="result" value={document.resultDigest} />], ['Claim sheet', <Hash key="sheet" value={document.sheetDigest} />]]} />
      </Card>
    </>
  );
}
