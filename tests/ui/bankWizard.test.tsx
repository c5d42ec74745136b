import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, fireEvent, render, screen } from '@testing-library/react-native';

import { BankEnded } from '@/components/banks/BankEnded';
import { standingDangers } from '@/components/banks/bankDangers';
import { bankSteps, bankStepOf, lastBankStep } from '@/components/banks/bankSteps';
import { type BankFormValues, emptyBank, newBankValues } from '@/components/banks/bankValues';
import { NewBankPage } from '@/components/banks/NewBankPage';
import { emptyProposal, proposalSchema } from '@/components/banks/proposalValues';
import { similarCellTypes } from '@/components/banks/similarCellTypes';
import { banksQuery, cellTypesQuery } from '@/lib/client/banks';
import { sessionKey } from '@/lib/client/session';
import { bankFieldsSchema, type CellTypeChoice } from '@/lib/contract/banks';

import { sampleBank } from '../support/checkSample';

const mockReplace = jest.fn();
jest.mock('expo-router', () => ({
  Link: jest.requireActual('react-native').Text,
  useRouter: () => ({ replace: mockReplace }),
}));

const mockRequest = jest.fn();
jest.mock('@/lib/client/http', () => ({
  ...jest.requireActual('@/lib/client/http'),
  apiRequest: (...request: unknown[]) => mockRequest(...request),
}));

const userId = 'b6f5e0a2-6f1a-4f0e-9f2b-0a7d1f6f3c11';
const draftKey = `ebbline.draft.${userId}/bank/new`;
const storage = new Map<string, string>();
const cellType: CellTypeChoice = {
  ...sampleBank().cellType,
  faceAreaMm2: 35_000,
  isProposed: false,
};

beforeEach(() => {
  storage.clear();
  mockReplace.mockReset();
  mockRequest.mockReset();
  Object.assign(globalThis, {
    localStorage: {
      getItem: (name: string) => storage.get(name) ?? null,
      setItem: (name: string, value: string) => storage.set(name, value),
      removeItem: (name: string) => storage.delete(name),
    },
    addEventListener: () => {},
    removeEventListener: () => {},
    scrollTo: () => {},
  });
});

async function open(draft?: Partial<BankFormValues>) {
  if (draft) storage.set(draftKey, JSON.stringify({ ...newBankValues(undefined), ...draft }));
  const client = new QueryClient({
    defaultOptions: {
      queries: { staleTime: Infinity, gcTime: Infinity, retry: false },
      mutations: { gcTime: Infinity },
    },
  });
  client.setQueryData(sessionKey, {
    user: { id: userId, email: 'a@example.org', role: 'owner' },
    isDemo: false,
  });
  client.setQueryData(cellTypesQuery.queryKey, [cellType]);
  client.setQueryData(banksQuery.queryKey, []);
  render(
    <QueryClientProvider client={client}>
      <NewBankPage />
    </QueryClientProvider>,
  );
  await act(async () => {});
}

const press = async (name: string | RegExp) => {
  fireEvent.press(screen.getByRole('button', { name }));
  await act(async () => {});
};
const heading = (name: string) => screen.getByRole('heading', { name });

const filled: Partial<BankFormValues> = {
  cellTypeId: cellType.id,
  name: 'Shed',
  series: '16',
  firstUseMonth: '2023-05',
  clamping: 'rigid',
  bought: 'new',
};

describe('the wizard', () => {
  it('asks for every field that a bank has, each in one step', () => {
    const asked = bankSteps.flatMap(({ fields }) => fields);
    const { sources, ...fields } = bankFieldsSchema.shape;
    expect(sources).toBeDefined();
    expect([...asked].sort()).toEqual(Object.keys(fields).sort());
  });

  it('does not go on before a step is right, and says what is missing beside the field', async () => {
    await open();
    await press('Next: how they are wired');
    screen.getByText('Choose one.');
    heading('Which cells');
    screen.getByText('Add a bank, step 1 of 6');
  });

  it('holds up a step by its own fields alone', async () => {
    await open({ step: 1, name: 'Shed', series: '16', firstUseMonth: '2023-05' });
    await press('Next: clamping and spacing');
    heading('Clamping and spacing');
    await press('Next: where and within which limits');
    screen.getByText('Choose one.');
  });

  it('is taken up at the step it was left at, and can be started anew', async () => {
    await open({ ...filled, step: 2 });
    heading('Clamping and spacing');
    screen.getByText('Taken up where you left off');
    await press('Start anew');
    heading('Which cells');
    expect(storage.has(draftKey)).toBe(false);
  });

  it('asks for force and torque of clamped cells only', async () => {
    await open({ ...filled, step: 2 });
    screen.getByLabelText(/^Torque/);
    fireEvent.press(screen.getByRole('radio', { name: /^Not clamped/ }));
    await act(async () => {});
    expect(screen.queryByLabelText(/^Torque/)).toBeNull();
  });

  it('writes an estimated force into its field, with the pressure and the source', async () => {
    await open({ ...filled, step: 2, clampTorqueNm: '2' });
    await press('Estimate it from the torque');
    await press('Use 6,700 N');
    expect(JSON.stringify(screen.toJSON())).toMatch(/On a face of 350 cm² that is 191.kPa/);
    expect(screen.getAllByRole('radio', { name: 'estimated', checked: true })).toHaveLength(1);
  });

  it('says at the end what is still missing, and leads there', async () => {
    await open({ ...filled, bought: '', step: lastBankStep });
    screen.getByText('Something is still missing');
    await press('Go there');
    heading('Start and purchase');
  });

  it('sends what was looked over, and forgets the draft', async () => {
    mockRequest.mockResolvedValueOnce(sampleBank({ name: 'Shed' }));
    await open({ ...filled, clampForceN: '800', chargeLimitV: '3,45', step: lastBankStep });
    await press('Add the bank');
    const [, path, { body }] = mockRequest.mock.calls[0]!;
    expect(path).toBe('/api/banks');
    expect(body).toMatchObject({
      name: 'Shed',
      parallel: 1,
      series: 16,
      clampForceN: 800,
      chargeLimitV: 3.45,
      sources: { chargeLimitV: 'readOff' },
    });
    expect(body).not.toHaveProperty('step');
    expect(mockReplace).toHaveBeenCalled();
    expect(storage.has(draftKey)).toBe(false);
  });

  it('finds the step of a field, and the last one for what stands on none', () => {
    expect(bankStepOf(['priceCurrency', 'firstUseMonth'])).toBe(1);
    expect(bankStepOf(['version'])).toBe(lastBankStep);
  });

  it('starts from where the last bank stands, and takes nothing else over', () => {
    const last = sampleBank({ place: 'shed', climateBand: 'warm', priceCurrency: 'EUR', clamping: 'rigid' });
    expect(newBankValues(last)).toEqual({
      ...newBankValues(undefined),
      place: 'shed',
      climateBand: 'warm',
      priceCurrency: 'EUR',
    });
    expect(newBankValues(undefined)).toMatchObject({ ...emptyBank, parallel: '1', sources: {} });
  });
});

describe('similarCellTypes', () => {
  const named = (maker: string, name: string) => ({ ...cellType, id: name, maker, name });
  const listed = [named('Halmund', 'Skerry 240'), named('Halmund', 'Holm 100'), named('Tarn', 'Weir 50')];
  const namesOf = (maker: string, name: string) =>
    similarCellTypes(listed, { maker, name }).map((one) => one.name);

  it.each([
    ['Halmund', 'Skerry 240'],
    ['halmund', 'SKERRY-240'],
    ['', 'Skery240'],
    ['Halmund', 'Skerry 280'],
  ])('points out what %s %s is nearly', (maker, name) => {
    expect(namesOf(maker, name)).toEqual(['Skerry 240']);
  });

  it.each([
    ['Quillmere', 'Fathom 314'],
    ['Halmund', ''],
    ['Halmund', 'Sk'],
  ])('points out nothing for %s %s', (maker, name) => {
    expect(namesOf(maker, name)).toEqual([]);
  });
});

describe('a proposal', () => {
  const typed = { ...emptyProposal, maker: 'Quillmere', name: 'Fathom', ratedAh: '314' };

  it('is typed in cm² and sent in mm²', () => {
    expect(proposalSchema.parse({ ...typed, faceAreaMm2: '345,6' })).toEqual({
      maker: 'Quillmere',
      name: 'Fathom',
      format: 'prismatic',
      ratedAh: 314,
      nominalV: 3.2,
      faceAreaMm2: 34_560,
      massKg: null,
    });
  });

  it('names the range in the unit that is typed', () => {
    const { error } = proposalSchema.safeParse({ ...typed, nominalV: '3.7', faceAreaMm2: '0.5' });
    expect(Object.fromEntries(error!.issues.map(({ path, message }) => [path.join('.'), message]))).toEqual({
      nominalV: 'Enter a number from 3 to 3.4 V.',
      faceAreaMm2: 'Enter a number from 1 to 5,000 cm².',
    });
  });
});

describe('an ended bank', () => {
  const ending = { id: userId, kind: 'retired', happenedOn: '2026-09-01', note: 'Worn.' } as const;

  it('is thanked for, with what it leaves behind', () => {
    const bank = sampleBank({ firstUseMonth: '2023-03', checkCount: 3, events: [ending] });
    render(<BankEnded bank={bank} ending={ending} isNew={false} />);
    heading('Thank you: this bank has done its part');
    expect(JSON.stringify(screen.toJSON())).toMatch(
      /Retired on 1 Sep 2026, 3\.5.years after its first use\. Its 3 checks stay/,
    );
  });

  it('that was bought used does not claim to be in the pool', () => {
    const bank = sampleBank({ bought: 'used', checkCount: 1, events: [ending] });
    render(<BankEnded bank={bank} ending={ending} isNew={false} />);
    screen.getByText(/pooled lives leave out banks that were not bought new/);
  });
});

describe('standingDangers', () => {
  const titles = (...kinds: Parameters<typeof standingDangers>[0][number]['kind'][]) =>
    standingDangers(kinds.map((kind) => ({ kind }))).map(({ title }) => title);

  it('holds after a cell failed or swelled, once each', () => {
    expect(titles('swollen', 'rebalanced', 'swollen')).toEqual(['A swollen cell means stop']);
    expect(titles('cellFailed', 'sold')).toEqual(['A failed cell is left alone']);
  });

  it('ends with a replaced cell', () => {
    expect(titles('swollen', 'cellReplaced')).toEqual([]);
    expect(titles('rebalanced', 'meterChanged')).toEqual([]);
  });
});
