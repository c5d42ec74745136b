import { commonPasswords } from '@/server/accounts/commonPasswords';
import { passwordProblem } from '@/server/accounts/passwordRules';
import { hashPassword, isPasswordOf } from '@/server/accounts/passwords';

const email = 'merle.tide@example.org';

describe('a new password', () => {
  it.each([
    ['common', 'password123'],
    ['common in capitals', 'PassWord123'],
    ['one character', 'aaaaaaaaaaaa'],
    ['a repeated part', 'abcabcabcabc'],
    ['a repeated part that is cut off', '12341234123'],
    ['a run of letters', 'cdefghijklmn'],
    ['a run of digits backwards', '9876543210'],
    ['a run over the keyboard', 'tyuiopasdfgh'],
    ['the address', 'merle.tide@example.org'],
    ['the first part of the address with an ending', 'Merle.Tide99'],
  ])('is refused when it is %s', (_name, password) => {
    expect(passwordProblem(password, email)).toBeDefined();
  });

  it.each(['tide table in the hall', 'correct-ladder-9', 'ebb-and-flow-2026', 'пароль как у людей'])(
    'is taken when it is none of these: %s',
    (password) => expect(passwordProblem(password, email)).toBeUndefined(),
  );

  it('may hold the first part of a short address', () => {
    expect(passwordProblem('planning a trip', 'ann@example.org')).toBeUndefined();
  });
});

describe('the list of common passwords', () => {
  it('holds a thousand that the rule of length would let pass, in lower case', () => {
    expect(commonPasswords.size).toBe(1000);
    for (const password of commonPasswords) {
      expect(password.length).toBeGreaterThanOrEqual(10);
      expect(password).toBe(password.toLowerCase());
    }
  });
});

describe('a password hash', () => {
  it('fits its password only', async () => {
    const account = { passwordHash: await hashPassword('tide table in the hall', 4) };
    expect(await isPasswordOf(account, 'tide table in the hall', 4)).toBe(true);
    expect(await isPasswordOf(account, 'tide table in the hal', 4)).toBe(false);
  });

  it('fits the same letters composed otherwise', async () => {
    const account = { passwordHash: await hashPassword('ma\u0304re\u0301e haute', 4) };
    expect(await isPasswordOf(account, 'm\u0101r\u00e9e haute', 4)).toBe(true);
  });

  it('of nobody fits no password, with the same work', async () => {
    expect(await isPasswordOf(null, 'tide table in the hall', 4)).toBe(false);
    const { default: bcrypt } = await import('bcryptjs');
    const compare = jest.spyOn(bcrypt, 'compare');
    await isPasswordOf(null, 'x', 4);
    expect(bcrypt.getRounds(String(compare.mock.calls[0]?.[1]))).toBe(4);
    compare.mockRestore();
  });
});
