import { AppError } from '../errors';
import { commonPasswords } from './commonPasswords';

const runs = ['abcdefghijklmnopqrstuvwxyz', '01234567890123456789', 'qwertyuiopasdfghjklzxcvbnm'];
const longestRepeatedPart = 4;
/** An address's first part counts from this length on, and so does what else must stand beside it. */
const shortestLocalPart = 4;
const leastBeside = 6;

/** Refuses a new password that is tried first by whoever guesses; its length is the contract's to check. */
export function assertPasswordAllowed(password: string, email: string): void {
  const problem = passwordProblem(password, email);
  if (problem) throw new AppError('invalid', undefined, { password: problem });
}

/** Why a new password is refused; undefined if it is not. */
export function passwordProblem(password: string, email: string): string | undefined {
  const lower = password.normalize('NFKC').toLowerCase();
  if (commonPasswords.has(lower)) return 'This is one of the passwords that are tried first. Choose another.';
  if (isRepetition(lower))
    return 'The same few characters over and over are guessed at once. Choose another.';
  if (isRun(lower)) return 'A run along the alphabet or the keyboard is guessed at once. Choose another.';
  if (isAddress(lower, email)) return 'This is close to your e-mail address. Choose another.';
  return undefined;
}

function isRepetition(password: string): boolean {
  for (let length = 1; length <= longestRepeatedPart; length += 1) {
    const part = password.slice(0, length);
    if (part.repeat(Math.ceil(password.length / length)).startsWith(password)) return true;
  }
  return false;
}

function isRun(password: string): boolean {
  const reversed = [...password].reverse().join('');
  return runs.some((run) => run.includes(password) || run.includes(reversed));
}

function isAddress(password: string, email: string): boolean {
  const localPart = email.slice(0, email.lastIndexOf('@')).toLowerCase();
  if (localPart.length < shortestLocalPart || !password.includes(localPart)) return false;
  return password.length - localPart.length < leastBeside || password.includes(email.toLowerCase());
}
