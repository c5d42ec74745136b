import { act, fireEvent, render, screen } from '@testing-library/react-native';

import {
  Button,
  Checkbox,
  Disclosure,
  RadioGroup,
  SentenceUse,
  Table,
  Text,
  TextField,
} from '@/components/ui';

it('a field ties its label, hint and error to its input', () => {
  render(
    <TextField label="Name" hint="As you call it." error="This is needed." value="" onChange={() => {}} />,
  );
  const { props } = screen.getByLabelText('Name');
  const [error, hint] = String(props['aria-describedby']).split(' ');
  expect(screen.getByText('This is needed.').props.nativeID).toBe(error);
  expect(screen.getByText('As you call it.').props.nativeID).toBe(hint);
  expect(props['aria-invalid']).toBe(true);
});

it('a busy button is not pressed', () => {
  const onPress = jest.fn();
  const { rerender } = render(<Button label="Send" onPress={onPress} busy />);
  fireEvent.press(screen.getByText('Send'));
  expect(onPress).not.toHaveBeenCalled();
  rerender(<Button label="Send" onPress={onPress} />);
  fireEvent.press(screen.getByText('Send'));
  expect(onPress).toHaveBeenCalledTimes(1);
});

it('a checkbox turns over, with the space bar too', () => {
  const onChange = jest.fn();
  render(<Checkbox label="Agreed" checked={false} onChange={onChange} />);
  fireEvent.press(screen.getByRole('checkbox'));
  fireEvent(screen.getByRole('checkbox'), 'keyDown', { key: ' ', preventDefault: () => {} });
  expect(onChange.mock.calls).toEqual([[true], [true]]);
});

it('arrow keys move within a radio group, which is one stop of the Tab key', () => {
  const onChange = jest.fn();
  const options = [
    { value: 'none', label: 'None' },
    { value: 'rigid', label: 'Rigid' },
    { value: 'sprung', label: 'Sprung' },
  ] as const;
  render(<RadioGroup label="Clamping" value="none" onChange={onChange} options={options} />);
  const radios = screen.getAllByRole('radio');
  expect(radios.map((radio) => radio.props.tabIndex)).toEqual([0, -1, -1]);
  const key = (key: string) => ({ key, preventDefault: () => {} });
  fireEvent(radios[0]!, 'keyDown', key('ArrowDown'));
  fireEvent(radios[0]!, 'keyDown', key('ArrowUp'));
  expect(onChange.mock.calls).toEqual([['rigid'], ['sprung']]);
});

it('a disclosure builds its matter when it is opened', () => {
  const build = jest.fn(() => <Text>k times n to the z</Text>);
  const Matter = () => build();
  render(
    <Disclosure label="How this was computed">
      <Matter />
    </Disclosure>,
  );
  expect(build).not.toHaveBeenCalled();
  fireEvent.press(screen.getByText('How this was computed'));
  expect(screen.getByText('k times n to the z')).toBeTruthy();
});

it('a table stacks its rows on phones, each value with its title', () => {
  render(
    <Table
      caption="Lives"
      columns={[
        { key: 'name', title: 'Cell', cell: (row) => row.name },
        { key: 'life', title: 'Years to 80 %', figures: true, cell: (row) => row.life },
      ]}
      rows={[
        { name: 'Skerry 240', life: '13' },
        { name: 'Corrie C50', life: null },
      ]}
      rowKey={(row) => row.name}
    />,
  );
  expect(screen.getByText('Skerry 240')).toBeTruthy();
  expect(screen.getAllByText('Years to 80 %')).toHaveLength(2);
  expect(screen.getByText('–')).toBeTruthy();
});

describe('the sentence', () => {
  const renderSentence = (onChange: (use: { depth: number; clamping: string }) => void) =>
    render(
      <SentenceUse
        value={{ depth: 0.6, clamping: 'none' }}
        onChange={onChange}
        parts={[
          'Cycled ',
          {
            key: 'depth',
            label: 'Depth',
            unit: '%',
            min: 5,
            max: 100,
            step: 5,
            show: (depth) => `${depth * 100} % deep`,
            toShown: (depth) => depth * 100,
            fromShown: (percent) => percent / 100,
          },
          ', ',
          {
            key: 'clamping',
            label: 'Clamping',
            show: (clamping) => (clamping === 'none' ? 'not clamped' : clamping),
            options: [
              { value: 'none', label: 'Not clamped' },
              { value: 'rigid', label: 'Rigid' },
            ],
          },
          '.',
        ]}
      />,
    );

  it('changes a number within its limits', () => {
    const onChange = jest.fn();
    renderSentence(onChange);
    fireEvent.press(screen.getByText('60 % deep'));
    fireEvent.changeText(screen.getByDisplayValue('60'), '140');
    fireEvent.press(screen.getByText('Use this'));
    expect(screen.getByText('Enter a number from 5 to 100 %.')).toBeTruthy();
    fireEvent.changeText(screen.getByDisplayValue('140'), '82,5');
    fireEvent.press(screen.getByText('Use this'));
    expect(onChange).toHaveBeenCalledWith({ depth: 0.825, clamping: 'none' });
  });

  it('changes one of a few', () => {
    const onChange = jest.fn();
    renderSentence(onChange);
    fireEvent.press(screen.getByText('not clamped'));
    fireEvent.press(screen.getByText('Rigid'));
    act(() => fireEvent.press(screen.getByText('Use this')));
    expect(onChange).toHaveBeenCalledWith({ depth: 0.6, clamping: 'rigid' });
  });
});
