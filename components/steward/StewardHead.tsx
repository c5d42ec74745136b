import { usePathname } from 'expo-router';

import { SecondFactorNotice } from '@/components/secondFactor/SecondFactorNotice';
import { Link, PageHead, Row } from '@/components/ui';

const parts = [
  { href: '/steward', label: 'Health' },
  { href: '/steward/people', label: 'People' },
  { href: '/steward/releases', label: 'Releases' },
  { href: '/steward/trail', label: 'Trail' },
] as const;

/** The head of the steward's pages, with the ways between them. */
export function StewardHead({ title, sub }: { title: string; sub: string }) {
  const here = usePathname();
  return (
    <>
      <PageHead
        title={title}
        sub={sub}
        above={
          <nav aria-label="Steward">
            <Row gap="l">
              {parts.map(({ href, label }) => (
                <Link key={href} href={href} tone={href === here ? 'ink' : 'tide'} strong={href === here}>
                  {label}
                </Link>
              ))}
            </Row>
          </nav>
        }
      />
      <SecondFactorNotice />
    </>
  );
}
