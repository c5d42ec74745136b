import { act, fireEvent, render, screen } from '@testing-library/react-native';
import { useForm, useWatch } from 'react-hook-form';

import { zodResolver } from '@hookform/resolvers/zod';
import { z } from 'zod';

import { BoundNumber, quantityText } from '@/components/forms';
import { Text } from '@/components/ui';

function OneNumber() {
  const { control } = useForm({ defaultValues: { force: '3000' } });
  const force = useWatch({ control, name: 'force' });
  return (
    <>
      <BoundNumber control={control} name="force" label="Force" unit="N" units={['N', 'kgf', 'lbf']} />
      <Text>{`held ${force}`}</Text>
    </>
  );
}

const field = () => screen.getByLabelText('Force');
const switchTo = (unit: string) =>
  act(() => screen.UNSAFE_getByType('select' as never).props.onChange({ target: { value: unit } }));

it('shows the held number in the unit chosen and holds what is typed in its own', () => {
  render(<OneNumber />);
  switchTo('kgf');
  // 3000 N / 9.80665 N/kgf (NIST SP 811, B.8), ten digits.
  expect(field().props.value).toBe('305.9148639');
  fireEvent.changeText(field(), '306');
  expect(screen.getByText('held 3000.8349')).toBeTruthy();
});

it('leaves what is typed as typed, half-finished numbers too', () => {
  render(<OneNumber />);
  switchTo('kgf');
  for (const text of ['30', '30,', '30,5', '']) {
    fireEvent.changeText(field(), text);
    expect(field().props.value).toBe(text);
  }
});

it('holds words as they stand, so that the schema can refuse them', () => {
  render(<OneNumber />);
  switchTo('lbf');
  fireEvent.changeText(field(), 'hand tight');
  expect(screen.getByText('held hand tight')).toBeTruthy();
});

const coldSchema = z.object({ cold: quantityText({ min: -30, max: 70 }, '°C') });

function OneTemperature() {
  const { control } = useForm({
    resolver: zodResolver(coldSchema),
    mode: 'onChange',
    defaultValues: { cold: '' },
  });
  return <BoundNumber control={control} name="cold" label="Force" unit="°C" units={['°C', '°F']} />;
}

it('names a range in the unit that is shown', async () => {
  render(<OneTemperature />);
  await act(async () => fireEvent.changeText(field(), '99'));
  expect(screen.getByText('Enter a number from \u221230 to 70 °C.')).toBeTruthy();
  switchTo('°F');
  // -30 °C = -22 °F, 70 °C = 158 °F (NIST SP 811, B.8: t/°F = 1.8 t/°C + 32).
  expect(screen.getByText('Enter a number from \u221222 to 158 °F.')).toBeTruthy();
  await act(async () => fireEvent.changeText(field(), 'warm'));
  expect(screen.getByText('Enter a number.')).toBeTruthy();
});
