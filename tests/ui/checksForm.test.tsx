import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, fireEvent, render, screen } from '@testing-library/react-native';

import { CheckFormPage } from '@/components/checks/CheckFormPage';
import { checkSteps } from '@/components/checks/checkSteps';
import { type CheckFormValues, newCheckValues, valuesOfCheck } from '@/components/checks/checkValues';
import { bankQuery } from '@/lib/client/banks';
import { bankChecksQuery } from '@/lib/client/checks';
import { sessionKey } from '@/lib/client/session';
import { waitingChecksQuery } from '@/lib/client/waitingChecks';
import type { Check } from '@/lib/contract/checks';

import { sampleBank, sampleCheck } from '../support/checkSample';

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
const key = '3a2f7c80-1d6b-4a5c-8c1e-5f5b7f0e9d22';
const bank = sampleBank();
const draftKey = `ebbline.draft.${userId}/check/${bank.id}`;
const storage = new Map<string, string>();

/** Last year's check, whose figures no step before the last may show. */
const lastYear: Check = (() => {
  const check = sampleCheck({ id: '9d2f6d0e-7f0b-4c39-8a51-6a2f1c9d7e33' });
  return { ...check, reading: { ...check.reading, testedOn: '2025-10-30', capacityAh: 231.7 } };
})();

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

const keepDraft = (values: CheckFormValues) => storage.set(draftKey, JSON.stringify(values));
const filled = (step: number): CheckFormValues => ({
  ...valuesOfCheck(sampleCheck(), step),
  entry: 'typed',
  idempotencyKey: key,
});

async function open() {
  const client = new QueryClient({
    defaultOptions: {
      queries: { staleTime: Infinity, gcTime: Infinity, retry: false },
      mutations: { gcTime: Infinity },
    },
  });
  client.setQueryData(sessionKey, {
    user: { id: userId, email: 'a@example.org', role: 'owner', secondFactor: 'off' },
    isDemo: false,
  });
  client.setQueryData(waitingChecksQuery(userId).queryKey, []);
  client.setQueryData(bankQuery(bank.id).queryKey, bank);
  client.setQueryData(bankChecksQuery(bank.id).queryKey, [lastYear]);
  render(
    <QueryClientProvider client={client}>
      <CheckFormPage bankId={bank.id} />
    </QueryClientProvider>,
  );
  await act(async () => {});
  return client;
}

const press = (label: RegExp) =>
  act(async () => {
    fireEvent.press(screen.getByText(label));
  });
const shownText = () => JSON.stringify(screen.toJSON());

it('goes on only once the cautions are confirmed', async () => {
  await open();
  expect(screen.getByText('Recharge at once afterwards.')).toBeTruthy();
  await press(/^Next/);
  expect(screen.getByText('Read the cautions, then confirm it here.')).toBeTruthy();
  await act(async () => {
    fireEvent.press(screen.getByRole('checkbox'));
  });
  await press(/^Next/);
  expect(screen.getByText('The log, or typed')).toBeTruthy();
});

it.each(checkSteps.slice(0, -1).map(({ title }, step) => [step, title] as const))(
  'shows no figure of the check before in step %i, "%s"',
  async (step) => {
    keepDraft({ ...newCheckValues(lastYear, key), step, isAware: true, entry: 'typed' });
    await open();
    expect(screen.getByText(checkSteps[step]!.title)).toBeTruthy();
    expect(shownText()).not.toMatch(/231\.7|2025|Beside the check before/);
  },
);

it('holds the check against the one before in the last step, when everything is entered', async () => {
  keepDraft(filled(5));
  await open();
  expect(screen.getByText('Beside the check before')).toBeTruthy();
  expect(shownText()).toContain('30 Oct 2025');
});

it('says in the last step where the figures of the test disagree, before it is sent', async () => {
  const values = filled(5);
  // 226.4 Ah / 4.8 A = 47 h; 11.57 kWh / 226.4 Ah / 16 = 3.194 V.
  values.reading.meanCurrentA = '4.8';
  keepDraft(values);
  await open();
  const spaced = shownText().replace(/[\u202f\u00a0]/g, ' ');
  expect(spaced).toContain('At 4.8 A this would have taken 47 h');
  expect(spaced).toContain('Mean 3.194 V per cell: fits LFP.');
});

it('names the step that is not filled in before it computes anything', async () => {
  const values = filled(5);
  values.conditions.depthFraction = '';
  keepDraft(values);
  await open();
  expect(screen.getByText('Something is still missing')).toBeTruthy();
  await press(/^Go there$/);
  expect(screen.getByText('How the bank lived')).toBeTruthy();
});

it('sends the check once more under the same key after a failure, and forgets the draft when it is stored', async () => {
  keepDraft(filled(5));
  await open();
  const sent: unknown[] = [];
  mockRequest.mockImplementation(async (_schema, path: string, { method, body }) => {
    if (method !== 'POST') return path.endsWith('/checks') ? { checks: [lastYear] } : bank;
    sent.push(body);
    if (sent.length === 1) throw new Error('cut off');
    return { ...sampleCheck(), state: 'submitted' };
  });
  await press(/^Send the check$/);
  expect(storage.has(draftKey)).toBe(true);
  await press(/^Send the check$/);
  expect(sent).toHaveLength(2);
  expect(sent[0]).toEqual(sent[1]);
  expect(sent[0]).toMatchObject({ idempotencyKey: key, reading: { capacityAh: 226.4, energyWh: 11570 } });
  expect(storage.has(draftKey)).toBe(false);
  expect(mockReplace).toHaveBeenCalledTimes(1);
});
