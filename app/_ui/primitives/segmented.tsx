import { classes } from './classes';

interface SegmentedProps<V extends string> {
  readonly legend: string;
  readonly name: string;
  readonly options: readonly { readonly value: V; readonly label: string }[];
  readonly value?: V;
  readonly defaultValue?: V;
  readonly onChange?: (value: V) => void;
  readonly legendHidden?: boolean;
}

/** One choice of a few, always all in sight: radio buttons in the dress of joined buttons, so it works without script. */
export function Segmented<V extends string>({ legend, name, options, value, defaultValue, onChange, legendHidden }: SegmentedProps<V>) {
  return (
    <fieldset className="min-w-0">
      <legend className={legendHidden ? 'sr-only' : 'mb-1 text-small font-semibold'}>{legend}</legend>
      <div className="inline-flex max-w-full flex-wrap rounded border border-control">
        {options.map((option, i) => (
          <label key={option.value} className={classes('relative flex min-h-[34px] cursor-pointer items-center px-3 text-ui has-checked:bg-link has-checked:font-semibold has-checked:text-on-link has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-focus', i > 0 && 'border-l border-control')}>
            <input
              type="radio"
              className="sr-only"
              name={name}
              value={option.value}
              {...(value === undefined ? { defaultChecked: option.value === defaultValue } : { checked: option.value === value })}
              onChange={onChange ? () => onChange(option.value) : undefined}
              readOnly={!onChange && value !== undefined}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
