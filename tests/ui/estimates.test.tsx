import { fireEvent, render, screen } from '@testing-library/react-native';

import {
  ChargeWindowEstimate,
  DepthEstimate,
  RateEstimate,
  SpringEstimate,
  TemperatureEstimate,
  TorqueEstimate,
} from '@/components/estimates';

const bank = { ratedAh: 240, nominalV: 51.2 };
const onUse = jest.fn();

beforeEach(() => onUse.mockReset());

const open = (label: string) => fireEvent.press(screen.getByRole('button', { name: label }));
const type = (label: string, text: string) => fireEvent.changeText(screen.getByLabelText(label), text);
const press = (name: string) => fireEvent.press(screen.getByRole('button', { name }));
const words = () => JSON.stringify(screen.toJSON());

it('offers a depth, shows the formula with its numbers, and gives per cent', () => {
  render(<DepthEstimate bank={bank} onUse={onUse} />);
  open("Estimate it from a night's energy");
  expect(screen.getByRole('button', { name: 'Use the estimate' })).toBeDisabled();
  type('Energy in a typical night', '6');
  expect(words()).toContain('/ 0.92 / (');
  press('Use 53 %');
  expect(onUse).toHaveBeenCalledWith('53');
});

it('takes no inverter into account where the bank itself is metered', () => {
  render(<DepthEstimate bank={bank} onUse={onUse} />);
  open("Estimate it from a night's energy");
  type('Energy in a typical night', '6');
  fireEvent.press(screen.getByRole('radio', { name: 'at the bank' }));
  press('Use 49 %');
  expect(onUse).toHaveBeenCalledWith('49');
});

it('offers no depth of more than the bank holds, and says so', () => {
  render(<DepthEstimate bank={bank} onUse={onUse} />);
  open("Estimate it from a night's energy");
  type('Energy in a typical night', '20');
  screen.getByText('That is more than the bank is rated to hold.');
  expect(screen.getByRole('button', { name: 'Use the estimate' })).toBeDisabled();
});

it('turns watts into It', () => {
  render(<RateEstimate bank={bank} onUse={onUse} />);
  open('Estimate it from watts');
  type('Typical power in use', '1200');
  press('Use 25.5 A');
  expect(onUse).toHaveBeenCalledWith('0.106');
});

it('takes climate and place from the bank where it says them', () => {
  render(<TemperatureEstimate climateBand="mild" place="shed" onUse={onUse} />);
  open('Estimate it from climate and place');
  press('Use 21.5 °C');
  expect(onUse).toHaveBeenCalledWith('21.5');
});

it("reads a window off the bank's limits and the depth", () => {
  const limits = { chargeLimitV: 3.45, dischargeLimitV: 3 };
  render(<ChargeWindowEstimate limits={limits} depthFraction={0.6} onUse={onUse} />);
  open('Estimate it from the limits set');
  press('Use 35 to 95 %');
  expect(onUse).toHaveBeenCalledWith({ low: '35', high: '95' });
});

it('says that a limit on the flat part tells nothing', () => {
  const limits = { chargeLimitV: 3.3, dischargeLimitV: 3 };
  render(<ChargeWindowEstimate limits={limits} depthFraction={0.6} onUse={onUse} />);
  open('Estimate it from the limits set');
  screen.getByText(/^Below 3.4 V the curve is flat/);
  expect(screen.getByRole('button', { name: 'Use the estimate' })).toBeDisabled();
});

it('turns a torque into a force with its wide range, to two figures', () => {
  render(<TorqueEstimate torque="2" onUse={onUse} />);
  open('Estimate it from the torque');
  expect(words()).toMatch(/4,700.N to 8,700.N/);
  press('Use 6,700 N');
  expect(onUse).toHaveBeenCalledWith('6700');
});

it('asks for the torque first', () => {
  render(<TorqueEstimate torque="" onUse={onUse} />);
  open('Estimate it from the torque');
  screen.getByText('Enter the torque in its field first.');
});

it('turns springs into a force', () => {
  render(<SpringEstimate onUse={onUse} />);
  open('Estimate it from springs');
  type('Rate of one spring', '25');
  type('Compression', '8');
  press('Use 800 N');
  expect(onUse).toHaveBeenCalledWith('800');
});
