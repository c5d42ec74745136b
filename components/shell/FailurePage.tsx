import { useEffect } from 'react';
import { Button, Page, PageHead, Quiet, Text } from '../ui';

/** Shown when a page could not be drawn at all. */
export function FailurePage({ error, onRetry }: { error: Error; onRetry: () => void }) {
  useEffect(() => {
    console.error(error);
  }, [error]);

  return (
    <Page narrow>
      <PageHead title="This page failed" sub="Something in the program went wrong while drawing it." />
      <Text>
        What you typed into a form is kept on this device. Try the page again; if it fails again, reload it to
        get the newest version of the program.
      </Text>
      <Button kind="primary" label="Try again" onPress={onRetry} />
      <Quiet>{`What the program says of it: ${error.message}`}</Quiet>
    </Page>
  );
}
