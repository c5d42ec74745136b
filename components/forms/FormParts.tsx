import type { KeyboardEvent, ReactNode } from 'react';
import { useFormState, type Control, type FieldValues } from 'react-hook-form';
import { Banner, Button, type ButtonProps } from '../ui';

interface OfForm<Form extends FieldValues, Read> {
  control: Control<Form, unknown, Read>;
}

/** What is wrong with the form as a whole; stands right above its button. */
export function FormError<Form extends FieldValues, Read>({
  control,
  title = 'This was not sent',
}: OfForm<Form, Read> & { title?: string }) {
  const { errors } = useFormState({ control });
  const message = errors.root?.server?.message;
  return message ? (
    <Banner kind="error" title={title}>
      {message}
    </Banner>
  ) : null;
}

/** Sends the form; greyed only while it is on its way. */
export function SubmitButton<Form extends FieldValues, Read>({
  control,
  kind = 'primary',
  ...rest
}: OfForm<Form, Read> & Omit<ButtonProps, 'busy' | 'disabled'>) {
  const { isSubmitting } = useFormState({ control });
  return <Button {...rest} kind={kind} busy={isSubmitting} />;
}

export interface FormProps {
  /** Names the form for screen readers where the page has several. */
  label?: string;
  onSubmit: () => void;
  children: ReactNode;
}

/** Fields of a helper beside the form's own do not send it. */
const isAside = (target: HTMLElement) => target.closest('[data-aside]') !== null;

const singleLine = (target: EventTarget) =>
  target instanceof HTMLInputElement &&
  !/^(checkbox|radio|file|button)$/.test(target.type) &&
  !isAside(target);

/** A form that Enter sends from any field of one line, and that password managers recognise. */
export function Form({ label, onSubmit, children }: FormProps) {
  const sendOnEnter = (event: KeyboardEvent<HTMLFormElement>) => {
    if (event.key !== 'Enter' || event.nativeEvent.isComposing || !singleLine(event.target)) return;
    event.preventDefault();
    event.stopPropagation();
    onSubmit();
  };
  return (
    <form
      noValidate
      aria-label={label}
      onSubmit={(event) => {
        event.preventDefault();
        onSubmit();
      }}
      onKeyDownCapture={sendOnEnter}
      style={{ display: 'contents' }}
    >
      {children}
    </form>
  );
}
