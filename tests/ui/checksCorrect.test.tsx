import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, fireEvent, render, screen } from '@testing-library/react-native';

import { CheckFormPage } from '@/components/checks/CheckFormPage';
import { type CheckFormValues, newCheckValues, valuesOfCheck } from '@/components/checks/checkValues';
import { bankQuery } from '@/lib/client/banks';
import { waitingChecksQuery } from '@/lib/client/waitingChecks';
import { bankChecksQuery } from '@/lib/client/checks';
import { sessionKey } from '@/lib/client/session';
import type { Check } from '@/lib/contract/checks';

import { sampleBank, sampleCheck } from '../support/checkSample';

jest.mock('expo-router', () => ({
  Link: jest.requireActual('react-native').Text,
  useRouter: () => ({ replace: jest.fn() }),
}));

const mockRequest = jest.fn();
jest.mock('@/lib/client/http', () => ({
  ...jest.requireActual('@/lib/client/http'),
  apiRequest: (...request: unknown[]) => mockRequest(...request),
}));

const userId = 'b6f5e0a2-6f1a-4f0e-9f2b-0a7d1f6f3c11';
const bank = sampleBank();
const storage = new Map<string, string>();
const submitted = sampleCheck({ state: 'submitted' });

beforeEach(() => {
  storage.clear();
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

const keepDraft = (of: string, values: CheckFormValues) =>
  storage.set(`ebbline.draft.${userId}/check/${of}`, JSON.stringify(values));

async function open(checks: Check[], correct?: string) {
  const client = new QueryClient({
    defaultOptions: {
      queries: { staleTime: Infinity, gcTime: Infinity, retry: false },
      mutations: { gcTime: Infinity },
    },
  });
  const user = { id: userId, email: 'a@example.org', role: 'owner' } as const;
  client.setQueryData(sessionKey, { user, isDemo: false });
  client.setQueryData(waitingChecksQuery(userId).queryKey, []);
  client.setQueryData(bankQuery(bank.id).queryKey, bank);
  client.setQueryData(bankChecksQuery(bank.id).queryKey, checks);
  render(
    <QueryClientProvider client={client}>
      <CheckFormPage bankId={bank.id} correct={correct} />
    </QueryClientProvider>,
  );
  await act(async () => {});
}

const press = (label: RegExp) =>
  act(async () => {
    fireEvent.press(screen.getByText(label));
  });
const shownText = () => JSON.stringify(screen.toJSON()).replace(/[\u202f\u00a0]/g, ' ');

/** The server with one check. */
const answerWith = (check: Check) =>
  mockRequest.mockImplementation(async (_schema, path: string, { method }) =>
    method === 'PUT' ? check : path.endsWith('/checks') ? { checks: [check] } : bank,
  );

describe('a correction that was typed over an older state of the check', () => {
  const changed = (capacityAh: string): CheckFormValues => {
    const values = valuesOfCheck(submitted, 5);
    return { ...values, reading: { ...values.reading, capacityAh } };
  };
  const newer = { ...submitted, version: 2, reading: { ...submitted.reading, capacityAh: 224.1 } };

  it('is told, with what differs, before anything is sent', async () => {
    keepDraft(submitted.id, changed('225.5'));
    await open([newer], submitted.id);
    expect(screen.getByText('The check was changed elsewhere meanwhile')).toBeTruthy();
    expect(shownText()).toContain('stored 224.1 Ah, metered, yours 225.5 Ah, metered');
    expect(mockRequest).not.toHaveBeenCalled();
  });

  it('replaces the newer state only when its owner says so', async () => {
    keepDraft(submitted.id, changed('225.5'));
    await open([newer], submitted.id);
    await press(/^Keep mine$/);
    expect(screen.queryByText('The check was changed elsewhere meanwhile')).toBeNull();
    answerWith(newer);
    await press(/^Send the corrected check$/);
    const sent = mockRequest.mock.calls.find(([, , options]) => options.method === 'PUT');
    expect(sent?.[2].body).toMatchObject({ version: 2, reading: { capacityAh: 225.5 } });
  });

  it('gives way to what is stored when its owner says so', async () => {
    keepDraft(submitted.id, changed('225.5'));
    await open([newer], submitted.id);
    await press(/^Take what is stored$/);
    expect(screen.queryByText('The check was changed elsewhere meanwhile')).toBeNull();
    expect(shownText()).toContain('224.1 Ah');
    expect(shownText()).not.toContain('225.5 Ah');
  });

  it('sends the version it was typed over, so that the server can refuse it', async () => {
    await open([submitted], submitted.id);
    answerWith(submitted);
    await press(/^Send the corrected check$/);
    const sent = mockRequest.mock.calls.find(([, , options]) => options.method === 'PUT');
    expect(sent?.[2].body).toMatchObject({ version: 1 });
  });
});

describe('how the bank lived', () => {
  const before = sampleCheck({ id: '9d2f6d0e-7f0b-4c39-8a51-6a2f1c9d7e33' });
  const lastYear = { ...before, reading: { ...before.reading, testedOn: '2025-10-30' } };
  const key = '3a2f7c80-1d6b-4a5c-8c1e-5f5b7f0e9d22';
  const atLivedStep = () => {
    const values = newCheckValues(lastYear, key);
    const reading = { ...values.reading, testedOn: '2026-11-02' };
    return { ...values, step: 4, isAware: true, entry: 'typed' as const, reading };
  };
  const valueOf = (label: string) => screen.getByLabelText(label).props.value;

  it('is started from the last answers on request, the counter and idle days left empty', async () => {
    keepDraft(bank.id, atLivedStep());
    await open([lastYear]);
    expect(valueOf('Depth of a typical day')).toBe('');
    await press(/^Start with those answers$/);
    expect(valueOf('Depth of a typical day')).toBe('60');
    expect(valueOf('Mean over the year')).toBe('19');
    expect(valueOf('Counter, since new')).toBe('');
    expect(screen.queryByText(/^Start with those answers$/)).toBeNull();
  });

  it('offers nothing once something was said, or where there is no check before', async () => {
    const values = atLivedStep();
    keepDraft(bank.id, { ...values, conditions: { ...values.conditions, depthFraction: '50' } });
    await open([lastYear]);
    expect(screen.queryByText(/^Start with those answers$/)).toBeNull();
    screen.unmount();
    storage.clear();
    keepDraft(bank.id, atLivedStep());
    await open([{ ...lastYear, state: 'withdrawn' }]);
    expect(screen.queryByText(/^Start with those answers$/)).toBeNull();
  });
});
