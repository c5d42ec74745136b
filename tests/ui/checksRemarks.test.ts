import {
  currentRemark,
  endVoltageRemark,
  meanVoltageRemark,
  temperatureRemark,
} from '@/components/checks/remarks';

const spaced = (text: string | undefined) => text?.replace(/\u202f/g, ' ');

describe('the mean voltage', () => {
  // 11570 Wh / 226.4 Ah / 16 cells = 3.1940 V.
  it('is said of charge and energy that go together', () => {
    const remark = meanVoltageRemark(
      { capacityAh: '226,4', energyKwh: '11.57', method: 'countedDischarge' },
      16,
    );
    expect(spaced(remark?.text)).toBe('Mean 3.194 V per cell: fits LFP.');
    expect(remark?.isDoubt).toBe(false);
  });

  it('is doubted where energy is of another unit or the cells are counted wrongly', () => {
    const remark = meanVoltageRemark({ capacityAh: '226.4', energyKwh: '11.57', method: '' }, 8);
    expect(remark?.isDoubt).toBe(true);
    expect(spaced(remark?.text)).toContain('Mean 6.388 V per cell; LFP lies at 3.00 to 3.35 V.');
  });

  it('says nothing before both figures are there', () => {
    expect(meanVoltageRemark({ capacityAh: '226.4', energyKwh: '', method: '' }, 16)).toBeUndefined();
    expect(meanVoltageRemark({ capacityAh: '0', energyKwh: '11.57', method: '' }, 16)).toBeUndefined();
  });
});

describe('the current', () => {
  // 226.4 Ah / 4.8 A = 47.2 h; 226.4 Ah / 4.7 h = 48.2 A.
  it('is asked about where charge and duration tell of another', () => {
    const remark = currentRemark({ capacityAh: '226.4', meanCurrentA: '4.8', duration: '4:42' }, 240);
    expect(remark?.isDoubt).toBe(true);
    expect(spaced(remark?.text)).toBe(
      'At 4.8 A this would have taken 47 h, but you noted 4 h 42 min. Did you mean 48 A?',
    );
  });

  it('is said in It where it goes with them', () => {
    const remark = currentRemark({ capacityAh: '226.4', meanCurrentA: '48', duration: '4:42' }, 240);
    expect(remark).toEqual({ text: expect.any(String), isDoubt: false });
    expect(spaced(remark?.text)).toBe('0.20 It for this bank. Goes with charge and duration.');
  });

  it.each([
    ['4:42', '55', false],
    ['4:42', '56', true],
    ['4:42', '42', false],
    ['4:42', '41', true],
  ])('is doubted from 15 %% on: %s at %s A is %s', (duration, meanCurrentA, isDoubt) => {
    expect(currentRemark({ capacityAh: '226.4', meanCurrentA, duration }, 240)?.isDoubt).toBe(isDoubt);
  });
});

it('says when the cells are outside what can be brought to 25 °C', () => {
  expect(temperatureRemark('15', '15')).toBeUndefined();
  expect(temperatureRemark('14', '15.9')?.text).toContain('no correction');
  expect(temperatureRemark('36', '35')?.text).toContain('outside 15 to 35 °C');
});

it('says when a discharge left charge in', () => {
  expect(endVoltageRemark('2.8')).toBeUndefined();
  expect(endVoltageRemark('3.02')?.text).toContain('adds to the uncertainty');
});
