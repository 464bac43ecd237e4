// The strip of sums to choose from, with a place to write another.
import type { ComponentProps } from 'react';
import { ChoiceGroup } from './ChoiceGroup.tsx';

type Props = {
  legend: string;
  sums: readonly { value: string; words: string }[];
  chosen: string;
  radio: ComponentProps<'input'> & { name: string };
  /** The value of the choice that opens the written sum. */
  otherValue: string;
  other: ComponentProps<'input'> & { name: string };
  fault?: string | undefined;
};

export function SumRow({ legend, sums, chosen, radio, otherValue, other, fault }: Props) {
  return (
    <ChoiceGroup name={other.name} legend={legend} fault={fault}>
      <div className="amount-row">
        {sums.map(({ value, words }, place) => (
          <label key={value}>
            <input
              type="radio"
              {...radio}
              id={place === 0 ? radio.name : `${radio.name}-${value}`}
              value={value}
              defaultChecked={chosen === value}
            />
            <span className="big">{words}</span>
          </label>
        ))}
        <span className="other">
          <label className="other-choice">
            <input
              type="radio"
              {...radio}
              id={`${radio.name}-${otherValue}`}
              value={otherValue}
              defaultChecked={chosen === otherValue}
            />
            <span>Other £</span>
          </label>
          <input
            type="text"
            inputMode="decimal"
            autoComplete="off"
            {...other}
            id={other.name}
            aria-label="Another sum, in pounds"
            aria-describedby={fault ? `${other.name}-fault` : undefined}
            aria-invalid={fault ? true : undefined}
          />
        </span>
      </div>
    </ChoiceGroup>
  );
}
