import { useState } from 'react';
import type { FieldValues } from 'react-hook-form';
import { NumberField, type NumberFieldProps } from '../ui';
import { useBound, type Bound } from './binding';
import { messageInUnit } from './rangeMessage';
import { convertText } from './shownNumber';

export interface BoundNumberProps<U extends string> extends Omit<
  NumberFieldProps<U>,
  'value' | 'onChange' | 'onBlur' | 'error' | 'ref' | 'onUnitChange'
> {
  /** The unit the form holds and the schema reads; what is typed in another is converted. */
  unit: U;
  /** The one of `units` shown at first; the form's own by default. */
  firstUnit?: U;
  /** Between units that only the form knows how to convert: amperes and It of this bank. */
  convertTyped?: (text: string, from: U, to: U) => string;
  /** Odd, yet possible: shown as an error is while there is none, without holding up the form. */
  doubt?: string;
}

/** A number as text in the form, in its unit; readers may type it in another of `units`. */
export function BoundNumber<Form extends FieldValues, Read, U extends string>({
  control,
  name,
  unit,
  units,
  firstUnit = unit,
  convertTyped = convertText,
  doubt,
  ...rest
}: Bound<Form, string, Read> & BoundNumberProps<U>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  const held: string = value ?? '';
  const [shownUnit, setShownUnit] = useState<U>(firstUnit);
  // What was typed stays as typed for as long as the form still holds what came of it.
  const [typed, setTyped] = useState({ text: held, held, unit });

  const isCurrent = typed.held === held && typed.unit === shownUnit;
  const shown = isCurrent ? typed.text : convertTyped(held, unit, shownUnit);

  const type = (text: string) => {
    const next = convertTyped(text, shownUnit, unit);
    setTyped({ text, held: next, unit: shownUnit });
    onChange(next);
  };

  return (
    <NumberField
      {...rest}
      ref={ref}
      value={shown}
      onChange={type}
      onBlur={onBlur}
      error={messageInUnit(error, shownUnit, convertTyped) ?? doubt}
      unit={shownUnit}
      units={units}
      onUnitChange={setShownUnit}
    />
  );
}
