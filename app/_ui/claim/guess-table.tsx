import Link from 'next/link';
import { Card } from '../primitives/card';
import { Disclosure } from '../primitives/disclosure';
import { Table } from '../primitives/table';
import { conventionHref } from './convention-words';
import { confidenceWords, inUse, stateWords, topicWords, type AnsweredGuess } from './guess-words';

const speaks = ({ state }: AnsweredGuess): boolean => state !== 'confirmed';

function Row({ guess, state, answer }: AnsweredGuess) {
  const { about, part, name, proposed, agrees, reason, confidence, convention } = guess;
  return (
    <tr>
      <th scope="row">{topicWords[about]}<span className="block text-small font-normal text-ink-2">{part === 'noise' ? 'noise curve' : 'waveform'} {name}{convention && <>, <Link href={conventionHref(convention.id)} className="inline-flex min-h-8 min-w-8 items-center font-code text-code">{convention.id}</Link></>}</span></th>
      <td><span className="block min-w-[20ch] [overflow-wrap:anywhere]">{inUse(guess)}</span></td>
      <td><div className="min-w-[36ch] [overflow-wrap:anywhere]">{agrees ? 'the same' : proposed}<span className="block text-small text-ink-2">{reason}</span></div></td>
      <td>{confidenceWords(confidence)}</td>
      <td>{stateWords[state]}{answer && <span className="block text-small text-ink-2">{answer}</span>}</td>
    </tr>
  );
}

const Rows = ({ caption, guesses }: { readonly caption: string; readonly guesses: readonly AnsweredGuess[] }) => (
  <Table caption={caption}>
    <thead><tr><th scope="col">Word</th><th scope="col">In use</th><th scope="col">The data say</th><th scope="col">Confidence</th><th scope="col">Standing</th></tr></thead>
    <tbody>{guesses.map((one) => <Row key={`${one.guess.field} ${one.guess.about}`} {...one} />)}</tbody>
  </Table>
);

/** What the files say of the words beside them, and what their authors made of it. No number above depends on it. */
export function GuessTable({ guesses }: { readonly guesses: readonly AnsweredGuess[] }) {
  if (guesses.length === 0) return null;
  const [open, confirmed] = [guesses.filter(speaks), guesses.filter((one) => !speaks(one))];
  return (
    <Card title="What the files say of their declaration" level={2}>
      <p className="mb-2 max-w-measure text-ui text-ink-2">Guesses from samples, heads and noise columns. The confidence is a judgement. Nothing here moved a number: what the authors did not declare stays assumed.</p>
      {open.length > 0 ? <Rows caption="Guesses that are open, contradicted or set aside" guesses={open} /> : <p className="text-ui">Nothing contradicts what is declared.</p>}
      {confirmed.length > 0 && <Disclosure className="mt-2" summary={`${confirmed.length} ${confirmed.length === 1 ? 'declaration' : 'declarations'} that the data bear out`}><Rows caption="Declarations that the data bear out" guesses={confirmed} /></Disclosure>}
    </Card>
  );
}
