import type { Role } from '@/lib/contract/accounts';

import { letter, type Mail } from '../accounts/mails';
import { linkBase } from '../mail/linkBase';

const roleWords: Record<Role, string> = { owner: 'an owner', moderator: 'a moderator', steward: 'a steward' };

export function appointedMail(publicUrl: string, role: Role, isCodeNeeded: boolean): Mail {
  const code = isCodeNeeded
    ? ' Before you begin, set up the code that signing in asks for: it stands in your account.'
    : '';
  return {
    subject: `You are ${roleWords[role]} of Ebbline now`,
    text: letter(
      `A steward of Ebbline has made you ${roleWords[role]}.${code}`,
      `Sign in: ${linkBase(publicUrl)}/sign-in`,
      'If you do not want this, answer to the steward, who can take it back.',
    ),
  };
}

export function dismissedMail(from: Role): Mail {
  return {
    subject: `You are not ${roleWords[from]} of Ebbline any more`,
    text: letter(
      `A steward of Ebbline has ended your work as ${roleWords[from]}. Your account, your banks and your checks stay yours. Thank you for what you did.`,
    ),
  };
}

export function lockedMail(reason: string): Mail {
  return {
    subject: 'Your account is locked',
    text: letter(
      'A steward of Ebbline has locked your account, for this reason:',
      reason,
      'It can’t be signed in to until a steward unlocks it. Nothing of yours was deleted. If you think that this is a mistake, answer to the steward.',
    ),
  };
}

export function secondFactorClearedMail(publicUrl: string, reason: string, isCodeNeeded: boolean): Mail {
  const next = isCodeNeeded
    ? 'Sign in and set a code up anew before you go on with your work'
    : 'Sign in, and set a code up anew if you want one';
  return {
    subject: 'The code at sign-in was cleared by a steward',
    text: letter(
      'A steward of Ebbline has cleared the code that your account asked for after the password, for this reason:',
      reason,
      'The recovery codes are void, every sign-in has ended, and the password alone opens the account now.',
      `${next}: ${linkBase(publicUrl)}/sign-in`,
      `If you did not ask for this, choose a new password at once and answer to the steward: ${linkBase(publicUrl)}/reset`,
    ),
  };
}

export function unlockedMail(publicUrl: string): Mail {
  return {
    subject: 'Your account is open again',
    text: letter(
      'A steward of Ebbline has unlocked your account. You can sign in again.',
      `Sign in: ${linkBase(publicUrl)}/sign-in`,
    ),
  };
}
