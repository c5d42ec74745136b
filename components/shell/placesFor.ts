import type { ShellProps } from './Shell';
import type { Place } from './places';

const lifetimes: Place = { href: '/', label: 'Lifetimes', icon: 'lifetimes', under: ['/cells'] };
const compare: Place = { href: '/compare', label: 'Compare', icon: 'compare' };
const plan: Place = { href: '/plan', label: 'Plan', icon: 'plan' };
const questions: Place = { href: '/questions', label: 'Questions', icon: 'questions' };
const banks: Place = { href: '/banks', label: 'My banks', icon: 'banks' };
const screening: Place = { href: '/screening', label: 'Screening', icon: 'screening', isWorkbench: true };
const steward: Place = { href: '/steward', label: 'Steward', icon: 'steward' };
const outbox: Place = { href: '/outbox', label: 'Outbox', icon: 'outbox' };
const signIn: Place = {
  href: '/sign-in',
  label: 'Sign in',
  icon: 'account',
  under: ['/register', '/verify', '/reset'],
};
const account: Place = { href: '/settings', label: 'Account', icon: 'account' };

const footLinks = [
  { href: '/method', label: 'Method' },
  { href: '/method/diagnostics', label: 'Diagnostics' },
  { href: '/data', label: 'Data' },
] as const;

type Role = 'owner' | 'moderator' | 'steward';

/** Where the bar and the rail lead for whoever is signed in, or for a visitor. */
export function placesFor(
  user: { role: Role } | null,
  isDemo: boolean,
): Pick<ShellProps, 'barPlaces' | 'railPlaces' | 'ownPlaces' | 'corner' | 'footLinks'> {
  const canScreen = user !== null && user.role !== 'owner';
  const own = user ? account : signIn;
  const runs = user?.role === 'steward' ? [steward] : [];
  const work = canScreen ? [screening, ...runs] : [];
  const demo = isDemo ? [outbox] : [];
  return {
    // Five fit a phone's bar: who screens has less use of comparing and planning there.
    barPlaces: canScreen
      ? [lifetimes, questions, banks, ...work]
      : [lifetimes, compare, plan, questions, banks],
    railPlaces: [lifetimes, compare, plan, questions],
    ownPlaces: [banks, ...work, own, ...demo],
    footLinks: isDemo ? [...footLinks, outbox] : footLinks,
    corner: { href: own.href, label: own.label },
  };
}
