import type { ReactNode } from 'react';
import { numberParts, type NumberParts, type NumberStyle } from './format-number';
import { UnitLabel } from './unit-label';

/** What is not known is a word in a dashed box: never a zero, never blank. */
export const Unknown = ({ children = 'unknown' }: { readonly children?: ReactNode }) => (
  <span className="whitespace-nowrap rounded border border-dashed border-control px-1.5 text-ui text-ink-2">{children}</span>
);

/** The integer part has a fixed width, so that decimal points stand under one another. */
export const SetNumber = ({ parts }: { readonly parts: NumberParts }) => (
  <span className="whitespace-nowrap">
    <span className="i">{parts.sign}{parts.integer}</span>
    {parts.fraction && `.${parts.fraction}`}
    {parts.exponent !== null && <> × 10<sup>{String(parts.exponent).replace('-', '−')}</sup></>}
  </span>
);

interface NumberCellProps extends NumberStyle {
  readonly value: number | null;
  readonly unit?: string;
  /** Said where there is no number. */
  readonly unknown?: ReactNode;
}

/** A number in a column or a sentence; its unit goes with it. */
export function NumberCell({ value, unit, unknown, ...style }: NumberCellProps) {
  const parts = value === null ? null : numberParts(value, style);
  if (!parts) return <Unknown>{unknown}</Unknown>;
  return (
    <>
      <SetNumber parts={parts} />
      {unit ? <> <UnitLabel unit={unit} /></> : null}
    </>
  );
}

/** A number exactly as its author printed it: no digit is added or taken; `(3)` in the second ink. */
export function PrintedNumber({ printed, unit }: { readonly printed: string; readonly unit?: string }) {
  const match = /^([<>≥≤]\s*)?([-−+]?)([\d,]+)(\.\d*)?(\(\d+\))?(?:[eE]([-−+]?\d+))?(\s*±\s*\S+)?$/.exec(printed.trim());
  if (!match) return <span className="whitespace-nowrap">{printed}{unit ? <> <UnitLabel unit={unit} /></> : null}</span>;
  const [, bound = '', sign = '', integer = '', fraction = '', bracket, power, bar] = match;
  return (
    <>
      <span className="whitespace-nowrap">
        <span className="i">{bound}{sign.replace('-', '−')}{integer}</span>
        {fraction}
        {bracket && <span className="text-ink-2">{bracket}</span>}
        {power !== undefined && <> × 10<sup>{String(Number(power.replace('−', '-'))).replace('-', '−')}</sup></>}
        {bar && <span className="text-ink-2">{bar}</span>}
      </span>
      {unit ? <> <UnitLabel unit={unit} /></> : null}
    </>
  );
}
