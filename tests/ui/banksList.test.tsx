import { render, screen } from '@testing-library/react-native';

import { BankList } from '@/components/banks/BankList';

import { sampleBank, sampleCheck } from '../support/checkSample';

jest.mock('expo-router', () => ({
  Link: jest.requireActual('react-native').Text,
}));

const id = (last: string) => `5f0a1f7e-52a5-4a5e-9a53-0d3c3a4b8e${last}`;

it('lists the bank that waits for an answer first, with the question', () => {
  const question = 'How long did the bank rest after the charge?';
  const asked = sampleCheck({
    state: 'sentBack',
    history: [
      { at: '2026-11-03T09:00:00.000Z', by: 'owner', action: 'submitted', text: '' },
      { at: '2026-11-04T09:00:00.000Z', by: 'moderator', action: 'sentBack', text: question },
    ],
  });
  render(
    <BankList
      banks={[
        { bank: sampleBank({ id: id('01'), name: 'Shed', checkCount: 1 }), checks: [sampleCheck()] },
        { bank: sampleBank({ id: id('02'), name: 'Loft', checkCount: 1 }), checks: [asked] },
        { bank: sampleBank({ id: id('03'), name: 'Boat' }), checks: [] },
      ]}
    />,
  );
  const names = screen.getAllByText(/^(Shed|Loft|Boat)$/).map(({ props }) => props.children);
  expect(names).toEqual(['Loft', 'Shed', 'Boat']);
  expect(screen.getByText(question)).toBeTruthy();
  expect(screen.getByText('sent back')).toBeTruthy();
  expect(screen.getByText('no check yet')).toBeTruthy();
});

it('an answered question asks for nothing any more', () => {
  const answered = sampleCheck({
    state: 'submitted',
    history: [{ at: '2026-11-04T09:00:00.000Z', by: 'moderator', action: 'sentBack', text: 'Which meter?' }],
  });
  render(<BankList banks={[{ bank: sampleBank({ checkCount: 1 }), checks: [answered] }]} />);
  expect(screen.queryByText('Which meter?')).toBeNull();
});
