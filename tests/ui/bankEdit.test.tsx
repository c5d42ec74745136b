import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, fireEvent, render, screen } from '@testing-library/react-native';

import { type BankFormValues, valuesOfBank } from '@/components/banks/bankValues';
import { EditBankPage } from '@/components/banks/EditBankPage';
import { bankQuery, cellTypesQuery } from '@/lib/client/banks';
import { sessionKey } from '@/lib/client/session';
import type { Bank } from '@/lib/contract/banks';

import { sampleBank } from '../support/checkSample';

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
const storage = new Map<string, string>();
const bank: Bank = { ...sampleBank(), version: 1, spacingMm: null };
const draftKey = `ebbline.draft.${userId}/bank/${bank.id}`;
const conflict = 'The bank was changed elsewhere meanwhile';

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

async function open(stored: Bank, draft: BankFormValues) {
  storage.set(draftKey, JSON.stringify(draft));
  const client = new QueryClient({
    defaultOptions: {
      queries: { staleTime: Infinity, gcTime: Infinity, retry: false },
      mutations: { gcTime: Infinity },
    },
  });
  const user = { id: userId, email: 'a@example.org', role: 'owner' } as const;
  client.setQueryData(sessionKey, { user, isDemo: false });
  client.setQueryData(bankQuery(bank.id).queryKey, stored);
  client.setQueryData(cellTypesQuery.queryKey, []);
  mockRequest.mockImplementation(async () => stored);
  render(
    <QueryClientProvider client={client}>
      <EditBankPage bankId={bank.id} />
    </QueryClientProvider>,
  );
  await act(async () => {});
}

const press = (label: string) =>
  act(async () => {
    fireEvent.press(screen.getByRole('button', { name: label }));
  });
const sent = () => mockRequest.mock.calls.find(([, , options]) => options?.method === 'PUT')?.[2].body;

describe('changes of a bank that were kept on the device', () => {
  const typed = { ...valuesOfBank(bank), spacingMm: '3' };
  const newer = { ...bank, version: 2, spacingMm: 5 };

  it('are sent over the version they were typed over', async () => {
    await open(bank, typed);
    expect(screen.queryByText(conflict)).toBeNull();
    await press('Save the changes');
    expect(sent()).toMatchObject({ version: 1, spacingMm: 3 });
  });

  it('are told of a newer version, with what differs, before anything is sent', async () => {
    await open(newer, typed);
    screen.getByText(conflict);
    expect(JSON.stringify(screen.toJSON())).toContain('stored 5, yours 3');
    expect(mockRequest).not.toHaveBeenCalled();
  });

  it('replace the newer version only when their owner says so', async () => {
    await open(newer, typed);
    await press('Keep mine');
    expect(screen.queryByText(conflict)).toBeNull();
    await press('Save the changes');
    expect(sent()).toMatchObject({ version: 2, spacingMm: 3 });
  });

  it('give way to what is stored when their owner says so', async () => {
    await open(newer, typed);
    await press('Take what is stored');
    expect(screen.queryByText(conflict)).toBeNull();
    expect(screen.queryByDisplayValue('3')).toBeNull();
    screen.getByDisplayValue('5');
    expect(storage.has(draftKey)).toBe(false);
  });
});
