import { mailParagraphs } from '@/components/account/mailParagraphs';
import { nextPlace } from '@/components/account/nextPlace';
import { problemOf } from '@/components/account/problemOf';
import { ApiError } from '@/lib/client/http';

describe('where one goes after signing in', () => {
  it('is the page that asked for it', () => {
    expect(nextPlace('/banks/12/check', 'owner')).toBe('/banks/12/check');
  });

  it.each([
    'https://elsewhere.example',
    '//elsewhere.example',
    '/\\elsewhere.example',
    'javascript:alert(1)',
    '/\t/elsewhere.example',
    '',
  ])('is never another site: %s', (next) => expect(nextPlace(next, 'owner')).toBe('/banks'));

  it('is the work of the role otherwise', () => {
    expect(nextPlace(undefined, 'moderator')).toBe('/screening');
  });
});

describe('what a failure is told as', () => {
  const failure = (parts: Partial<ConstructorParameters<typeof ApiError>[0]>) =>
    problemOf(new ApiError({ code: 'invalid', message: 'Some fields need another look.', ...parts }));

  it('is the refusal, with the number to quote where there is one', () => {
    expect(failure({ code: 'tooManyRequests', message: 'Too many tries.' })).toBe('Too many tries.');
    expect(failure({ code: 'internal', message: 'Tell us the number:', requestId: '17' })).toBe(
      'Tell us the number: 17',
    );
  });

  it('is what is wrong with a field that nobody sees', () => {
    expect(failure({ fields: { token: 'The link is not complete.' } })).toBe('The link is not complete.');
  });
});

describe("a mail's text", () => {
  it('is paragraphs of words and links, which lead into this product whatever its address', () => {
    const text =
      'Open this link:\n\nhttps://exchange.example.org/verify?token=a-b_c\n\nSign in: http://x.example/sign-in\nEbbline\n';
    expect(mailParagraphs(text)).toEqual([
      [{ text: 'Open this link:' }],
      [{ text: 'https://exchange.example.org/verify?token=a-b_c', path: '/verify?token=a-b_c' }],
      [{ text: 'Sign in: ' }, { text: 'http://x.example/sign-in', path: '/sign-in' }, { text: '\nEbbline' }],
    ]);
  });
});
