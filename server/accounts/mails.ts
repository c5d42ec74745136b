import { tokenHours } from './oneTimeTokens';

interface Mail {
  subject: string;
  text: string;
}

const linkTo = (publicUrl: string, path: string, token: string) =>
  `${publicUrl.replace(/\/+$/, '')}${path}?token=${encodeURIComponent(token)}`;

const letter = (...paragraphs: string[]) => [...paragraphs, 'Ebbline'].join('\n\n') + '\n';

export function verifyMail(publicUrl: string, token: string): Mail {
  return {
    subject: 'Confirm your e-mail address',
    text: letter(
      'Someone, we hope you, opened an account at Ebbline with this address. To confirm that it is yours, open this link:',
      linkTo(publicUrl, '/verify', token),
      `The link can be used once, within ${tokenHours.verify} hours; a newer mail makes it void. If it was not you, do nothing: without the confirmation nobody can sign in.`,
    ),
  };
}

export function alreadyRegisteredMail(publicUrl: string): Mail {
  const base = publicUrl.replace(/\/+$/, '');
  return {
    subject: 'You already have an account',
    text: letter(
      'Someone, we hope you, tried to open an account at Ebbline with this address. It already has one, and nothing about it was changed.',
      `Sign in: ${base}/sign-in\nIf you do not know the password any more: ${base}/reset`,
      'If it was not you, there is nothing to do.',
    ),
  };
}

export function resetMail(publicUrl: string, token: string): Mail {
  return {
    subject: 'Choose a new password',
    text: letter(
      'Someone, we hope you, asked for a new password for the account with this address. To choose one, open this link:',
      linkTo(publicUrl, '/reset', token),
      `The link can be used once, within ${tokenHours.reset} hour. If it was not you, do nothing: your password stays as it is.`,
    ),
  };
}

export function passwordChangedMail(publicUrl: string): Mail {
  return {
    subject: 'Your password was changed',
    text: letter(
      'The password of your account was changed just now, and every browser that was signed in with it has been signed out.',
      `If it was not you, choose a new one at once: ${publicUrl.replace(/\/+$/, '')}/reset`,
    ),
  };
}
