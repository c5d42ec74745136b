import { act, fireEvent, render, screen, waitFor } from '@testing-library/react-native';
import { useState } from 'react';
import type { ReactTestInstance } from 'react-test-renderer';
import { z } from 'zod';

import {
  BoundNumber,
  BoundText,
  Form,
  FormError,
  numberText,
  SubmitButton,
  useLocalDraft,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Text } from '@/components/ui';
import { ApiError } from '@/lib/client/http';

const schema = z.object({
  name: z.string().min(1, 'This is needed.'),
  temperatureC: numberText(z.number().min(-20, 'At least -20 °C.').max(60, 'At most 60 °C.')),
});

interface TestFormProps {
  send: (values: { name: string; temperatureC: number }) => Promise<void>;
  draftKey?: string;
}

function TestForm({ send, draftKey }: TestFormProps) {
  const form = useValidatedForm(schema, { name: '', temperatureC: '' });
  const report = useServerErrors(form);
  const draft = useLocalDraft(draftKey ?? null, form);
  const [isSent, setIsSent] = useState(false);
  const { control } = form;
  const submit = form.handleSubmit(async (values) => {
    try {
      await send(values);
      draft.clear();
      setIsSent(true);
    } catch (error) {
      report(error);
    }
  });
  return (
    <Form onSubmit={submit}>
      <BoundText control={control} name="name" label="Name" />
      <BoundNumber
        control={control}
        name="temperatureC"
        label="Cell temperature"
        unit="°C"
        units={['°C', '°F']}
      />
      <FormError control={control} />
      <SubmitButton control={control} label="Send" onPress={submit} />
      {isSent && <Text>sent</Text>}
    </Form>
  );
}

const name = () => screen.getByLabelText('Name');
const temperature = () => screen.getByLabelText('Cell temperature');
// In braces: what pressing answers is not waited for, so that a test can look while the form is on its way.
const press = () =>
  act(async () => {
    fireEvent.press(screen.getByText('Send'));
  });
const type = (field: ReactTestInstance, text: string) => act(async () => fireEvent.changeText(field, text));
const leave = (field: ReactTestInstance) => act(async () => fireEvent(field, 'blur'));

const storage = new Map<string, string>();

beforeEach(() => {
  storage.clear();
  Object.assign(globalThis, {
    localStorage: {
      getItem: (key: string) => storage.get(key) ?? null,
      setItem: (key: string, value: string) => storage.set(key, value),
      removeItem: (key: string) => storage.delete(key),
    },
    addEventListener: () => {},
    removeEventListener: () => {},
  });
});

it('says what is wrong when a field is left, not while it is first typed into', async () => {
  render(<TestForm send={async () => {}} />);
  await type(temperature(), '99');
  expect(screen.queryByText('At most 60 °C.')).toBeNull();
  await leave(temperature());
  expect(screen.getByText('At most 60 °C.')).toBeTruthy();
  await type(temperature(), '25');
  expect(screen.queryByText('At most 60 °C.')).toBeNull();
});

it('sends what the schema read', async () => {
  const send = jest.fn(async () => {});
  render(<TestForm send={send} />);
  await type(name(), 'Shed bank');
  await type(temperature(), '22,5');
  await press();
  expect(await screen.findByText('sent')).toBeTruthy();
  expect(send).toHaveBeenCalledWith({ name: 'Shed bank', temperatureC: 22.5 });
});

it('is greyed only while it is on its way', async () => {
  let finish: () => void = () => {};
  render(<TestForm send={() => new Promise((resolve) => (finish = () => resolve()))} />);
  const isGreyed = () =>
    screen.getByRole('button', { name: 'Send' }).props.accessibilityState?.disabled === true;
  expect(isGreyed()).toBe(false);
  await type(name(), 'Shed bank');
  await type(temperature(), '22');
  await press();
  expect(isGreyed()).toBe(true);
  await act(async () => finish());
  expect(isGreyed()).toBe(false);
});

it('puts what the server refused beside its field, the rest above the button, and keeps what was typed', async () => {
  const send = async () => {
    throw new ApiError({
      code: 'invalid',
      message: 'Some fields need another look.',
      status: 422,
      fields: { name: 'You have a bank of this name.', unknown: 'And one thing more.' },
    });
  };
  render(<TestForm send={send} />);
  await type(name(), 'Shed bank');
  await type(temperature(), '22');
  await press();
  expect(await screen.findByText('You have a bank of this name.')).toBeTruthy();
  expect(screen.getByText('Some fields need another look. And one thing more.')).toBeTruthy();
  expect(name().props.value).toBe('Shed bank');
  expect(temperature().props.value).toBe('22');
});

it('keeps what was typed on this device, puts it back, and forgets it once sent', async () => {
  jest.useFakeTimers();
  const first = render(<TestForm send={async () => {}} draftKey="u1/test" />);
  await type(name(), 'Shed bank');
  await type(temperature(), '22,');
  act(() => jest.advanceTimersByTime(1000));
  first.unmount();
  jest.useRealTimers();
  expect([...storage.keys()]).toEqual(['ebbline.draft.u1/test']);

  const other = render(<TestForm send={async () => {}} draftKey="u2/test" />);
  expect(name().props.value).toBe('');
  other.unmount();

  render(<TestForm send={async () => {}} draftKey="u1/test" />);
  await waitFor(() => expect(name().props.value).toBe('Shed bank'));
  expect(temperature().props.value).toBe('22,');
  await type(temperature(), '22');
  await press();
  expect(await screen.findByText('sent')).toBeTruthy();
  expect(storage.size).toBe(0);
});

it('keeps the last keystrokes when the page is left at once', async () => {
  const view = render(<TestForm send={async () => {}} draftKey="u1/test" />);
  await type(name(), 'Shed');
  view.unmount();
  expect(storage.get('ebbline.draft.u1/test')).toContain('Shed');
});
