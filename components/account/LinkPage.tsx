import type { UseMutationResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';

import { Banner, Button, Page, PageHead, Stack, Text } from '@/components/ui';
import { ApiError } from '@/lib/client/http';

import { problemOf } from './problemOf';

interface LinkPageProps<Answer> {
  token: string | undefined;
  title: string;
  /** What pressing does. */
  children: string;
  label: string;
  action: UseMutationResult<Answer, Error, { token: string }>;
  /** What stands in the place of the button when the link is spent. */
  spent: string;
  /** The page after it was done. */
  done: (answer: Answer) => { title: string; sub: string; actions: ReactNode };
}

/**
 * What a link in a mail leads to: says what it does and waits for a press, as programs that look at links in mails would
 * set it off.
 */
export function LinkPage<Answer>(props: LinkPageProps<Answer>) {
  const { token, title, children, label, action, spent, done } = props;
  if (action.isSuccess) {
    const { actions, ...head } = done(action.data);
    return (
      <Page narrow>
        <PageHead {...head} />
        {actions}
      </Page>
    );
  }
  const isSpent = action.error instanceof ApiError && action.error.code === 'gone';
  const isCut = !token || (action.error instanceof ApiError && action.error.code === 'notFound');
  return (
    <Page narrow>
      <PageHead title={title} />
      {isCut && (
        <Banner kind="caution" title="The link is not complete">
          Open it from the mail, or copy all of it.
        </Banner>
      )}
      {isSpent && (
        <Banner kind="caution" title="This link does nothing any more">
          {spent}
        </Banner>
      )}
      {!isCut && !isSpent && (
        <Stack gap="l">
          <Text>{children}</Text>
          {action.error && (
            <Banner kind="error" title="That did not work">
              {problemOf(action.error)}
            </Banner>
          )}
          <Button
            kind="primary"
            wide
            label={label}
            busy={action.isPending}
            onPress={() => action.mutate({ token })}
          />
        </Stack>
      )}
    </Page>
  );
}
