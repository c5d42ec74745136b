import { act, fireEvent, render, screen } from '@testing-library/react-native';
import { useForm, useWatch } from 'react-hook-form';

import { BoundNumber } from '@/components/forms';
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
