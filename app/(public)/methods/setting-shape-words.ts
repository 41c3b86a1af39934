import { readable } from '@/app/_ui/math/format-number';
import { unitText } from '@/app/_ui/math/units';
import type { SettingRow, SettingShape } from '@/lib/engine/quantities/settings-table';

/** Type and range of a setting in words, as its schema has them. */
export function shapeWords({ shape, unit }: Pick<SettingRow, 'shape' | 'unit'>): string {
  const kind = words(shape);
  return unit === '' ? kind : `${kind}, in ${unitText(unit)}`;
}

function words(shape: SettingShape): string {
  switch (shape.kind) {
    case 'number':
      return `number${rangeOf(shape)}`;
    case 'integer':
      return `whole number${rangeOf(shape)}`;
    case 'interval':
      return `two numbers, the first lower${rangeOf(shape)}`;
    case 'choice':
      return `one of ${shape.options.map(String).join(', ')}`;
    case 'subset':
      return `any of ${shape.options.join(', ')}`;
    case 'modes':
      return 'all, or a list of [ℓ, m]';
    case 'response':
      return 'plus, cross, complex, or two numbers {plus, cross}';
    case 'taper':
      return `auto, none, or a number${rangeOf(shape)}`;
    case 'cosmology':
      return 'two numbers {h0, omegaM}';
    case 'place':
      return `one of ${shape.options.join(', ')}, or one number ${shape.numbers.map((number) => `{${number.name}${rangeOf(number)}}`).join(' or ')}`;
  }
}

function rangeOf({ min, max, above }: { readonly min?: number; readonly max?: number; readonly above?: number }): string {
  const low = above === undefined ? min : above;
  if (low === undefined && max === undefined) return '';
  if (max === undefined) return above === undefined ? ` from ${sized(low ?? 0)}` : ` above ${sized(above)}`;
  if (low === undefined) return ` up to ${sized(max)}`;
  return above === undefined ? ` from ${sized(low)} to ${sized(max)}` : ` above ${sized(above)}, up to ${sized(max)}`;
}

/** π is what an angle ends at, not 3.1415927. */
const sized = (value: number): string => {
  const turns = value / Math.PI;
  return turns !== 0 && Number.isInteger(turns) ? `${turns < 0 ? '−' : ''}${Math.abs(turns) === 1 ? '' : Math.abs(turns)}π` : readable(value);
};
