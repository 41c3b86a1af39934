import { Prose } from '@/app/_ui/math/render-markdown';
import { formatWithUncertainty } from '@/app/_ui/math/format-uncertainty';
import { Table } from '@/app/_ui/primitives/table';
import { VerdictChip } from '@/app/_ui/verdict/verdict-chip';
import type { VerdictState } from '@/app/_ui/verdict/verdict-words';
import { formatDay } from '@/app/views/dates';
import { placeText } from '@/app/views/place-text';
import { quantityWord } from '@/app/views/quantity-word';
import { DECISION_WORDS } from '@/lib/reviews/decision';
import type { LetterNumber } from '@/lib/reviews/letter';
import type { DecisionView } from '@/lib/services/reviews/decision-view';

/** Released decisions with their letters, the newest first; a letter is never changed afterwards. */
export function Letters({ decisions }: { readonly decisions: readonly DecisionView[] }) {
  if (decisions.length === 0) return null;
  return (
    <section className="wrap mt-10 grid gap-6" aria-labelledby="letters-h">
      <h2 id="letters-h">Decisions</h2>
      {decisions.map((decision) => (
        <article key={decision.id} className="grid gap-4 rounded border border-hair-2 bg-sheet px-5 py-4">
          <header>
            <h3>{DECISION_WORDS[decision.kind]}{decision.level !== null && `, level ${decision.level}`}</h3>
            <p className="text-ui text-ink-2">{decision.by} · {formatDay(decision.at)} · round {decision.round}, revision {decision.revision}{decision.remarks.length > 0 && ` · ${decision.remarks.join(', ')}`}</p>
            {decision.signing.state === 'waiting' && <p className="mt-1 text-ui">Waiting for the signer, which re-hashes every file first.</p>}
            {decision.signing.state === 'refused' && <p className="mt-1 text-ui text-differs">The signer refused: {decision.signing.reason}</p>}
          </header>
          <LetterNumbers numbers={decision.letter.numbers} />
          <Prose source={decision.letter.prose} />
        </article>
      ))}
    </section>
  );
}

export function LetterNumbers({ numbers }: { readonly numbers: readonly LetterNumber[] }) {
  if (numbers.length === 0) return null;
  return (
    <Table caption="Numbers of the letter">
      <thead><tr><th scope="col">Claim</th><th scope="col">Claimed</th><th scope="col">Recomputed ± U (k = 2)</th><th scope="col">Verdict</th></tr></thead>
      <tbody>
        {numbers.map((n, i) => (
          <tr key={i}>
            <th scope="row">{n.claim} {quantityWord(n.quantity)}{placeText(n.at) && `, ${placeText(n.at)}`}</th>
            <td className="whitespace-nowrap">{n.claimed} {n.unit}</td>
            <td className="whitespace-nowrap">{formatWithUncertainty(n.recomputed, n.expandedUncertainty, n.unit)}</td>
            <td><VerdictChip state={n.verdict as VerdictState} bare /></td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
