import { unitKey, unitSpoken, unitText } from './units';

/** A unit: printed for eyes, said in words to a screen reader where the sign would be read badly. */
export function UnitLabel({ unit }: { readonly unit: string }) {
  const key = unitKey(unit);
  if (key === '') return null;
  if (key === 'Msun') return <span className="whitespace-nowrap"><span aria-hidden>M<sub>⊙</sub></span><span className="sr-only">solar masses</span></span>;
  if (key === 'M') return <i>M</i>;
  if (key === 'Hz^-1/2') return <span className="whitespace-nowrap"><span aria-hidden>Hz<sup>−1/2</sup></span><span className="sr-only">{unitSpoken(unit)}</span></span>;
  return <>{unitText(unit)}</>;
}
