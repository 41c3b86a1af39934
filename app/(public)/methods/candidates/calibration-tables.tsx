import type { ReactNode } from 'react';
import { Table } from '@/app/_ui/primitives/table';

interface Rates {
  readonly claims: number;
  readonly singles: number;
  readonly pairs: number;
}
interface Found {
  readonly claims: number;
  readonly first: number;
  readonly shown: number;
  readonly stands: number;
}

/** `content/explain-calibration.json`: what the tests computed last. */
export interface Calibration {
  readonly lattice: readonly { readonly agreement: number; readonly published: { readonly singles: number; readonly withPairs: number }; readonly singles: number; readonly withPairs: number }[];
  readonly unexplained: { readonly onePoint: Rates; readonly severalPoints: Rates; readonly twoClaims: Rates };
  readonly planted: { readonly onePoint: Found; readonly severalPoints: Found };
}

const percent = (x: number): string => `${x} %`;

/** What a rate of so many draws leaves open, at 95 %: two standard errors, or three in so many where none or all were. */
function spread(x: number, claims: number): string {
  const three = Math.round(3000 / claims) / 10;
  if (x === 0) return `0 % (below ${three} %)`;
  if (x === 100) return `100 % (above ${100 - three} %)`;
  return `${x} ± ${Math.round(2000 * Math.sqrt(((x / 100) * (1 - x / 100)) / claims)) / 10} %`;
}

function Titled({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return <div className="min-w-0"><h3 className="mb-1.5 text-[16px]/[24px]">{title}</h3>{children}</div>;
}

export function CalibrationTables({ lattice, unexplained, planted }: Calibration) {
  const groups = [['one point', unexplained.onePoint], ['several points', unexplained.severalPoints], ['two claims of a sheet', unexplained.twoClaims]] as const;
  const plants = [['one point', planted.onePoint], ['several points', planted.severalPoints]] as const;
  return (
    <div className="mt-4 grid gap-8">
      <Titled title="Nothing planted: claims that were given a candidate all the same"><Table caption="Claims whose gap nothing explains: how many were given a candidate all the same">
        <thead><tr><th scope="col">Claims with</th><th scope="col" className="num">Drawn</th><th scope="col" className="num">One change, at most 5 %</th><th scope="col" className="num">Two changes, at most 1 %</th></tr></thead>
        <tbody>{groups.map(([name, row]) => <tr key={name}><th scope="row" className="font-normal!">{name}</th><td className="num">{row.claims}</td><td className="num">{spread(row.singles, row.claims)}</td><td className="num">{spread(row.pairs, row.claims)}</td></tr>)}</tbody>
      </Table></Titled>
      <Titled title="One reading planted: where its class came out"><Table caption="Claims with one planted reading: where its class came out">
        <thead><tr><th scope="col">Claims with</th><th scope="col" className="num">Drawn</th><th scope="col" className="num">First</th><th scope="col" className="num">Among three</th><th scope="col" className="num">As a candidate</th></tr></thead>
        <tbody>{plants.map(([name, row]) => <tr key={name}><th scope="row" className="font-normal!">{name}</th><td className="num">{row.claims}</td><td className="num">{spread(row.first, row.claims)}</td><td className="num">{spread(row.shown, row.claims)}</td><td className="num">{spread(row.stands, row.claims)}</td></tr>)}</tbody>
      </Table></Titled>
      <Titled title="A lattice of 27 factors: numbers that something fits by chance"><Table caption="A lattice of 27 factors: share of unexplained numbers that something fits, and the rates it is compared with">
        <thead><tr><th scope="col" className="num">Agreement asked</th><th scope="col" className="num">One change</th><th scope="col" className="num">compared with</th><th scope="col" className="num">One or two</th><th scope="col" className="num">compared with</th></tr></thead>
        <tbody>{lattice.map((row) => <tr key={row.agreement}><th scope="row" className="num font-normal!">{percent(100 * row.agreement)}</th><td className="num">{percent(row.singles)}</td><td className="num">{percent(row.published.singles)}</td><td className="num">{percent(row.withPairs)}</td><td className="num">{percent(row.published.withPairs)}</td></tr>)}</tbody>
      </Table></Titled>
    </div>
  );
}
