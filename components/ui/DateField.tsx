import type { Ref } from 'react';
import { FieldFrame, type FieldFrameProps, type FieldProps } from './Field';
import { nativeDate } from './nativeControl';

export interface DateFieldProps extends FieldProps, Pick<FieldFrameProps, 'footer'> {
  /** A day as 'YYYY-MM-DD', a month as 'YYYY-MM', or empty text. */
  value: string;
  onChange: (text: string) => void;
  onBlur?: () => void;
  min?: string;
  max?: string;
  ref?: Ref<HTMLInputElement>;
}

function CalendarField({
  kind,
  value,
  onChange,
  onBlur,
  min,
  max,
  ref,
  disabled = false,
  ...field
}: DateFieldProps & { kind: 'date' | 'month' }) {
  return (
    <FieldFrame {...field}>
      {({ id, describedBy, isInvalid }) => (
        <input
          ref={ref}
          id={id}
          type={kind}
          // Where the browser has no month picker, the field is text and this shows how to type it.
          placeholder={kind === 'month' ? 'YYYY-MM' : 'YYYY-MM-DD'}
          aria-describedby={describedBy}
          aria-invalid={isInvalid}
          aria-required={!field.optional}
          disabled={disabled}
          value={value}
          min={min}
          max={max}
          onBlur={onBlur}
          onChange={(event) => onChange(event.target.value)}
          style={nativeDate(isInvalid, disabled)}
        />
      )}
    </FieldFrame>
  );
}

/** A calendar day, typed or picked. */
export function DateField(props: DateFieldProps) {
  return <CalendarField kind="date" {...props} />;
}

/** A month of a year, typed or picked. */
export function MonthField(props: DateFieldProps) {
  return <CalendarField kind="month" {...props} />;
}
