import type { ComponentType } from 'react';

import { onDemand } from '../onDemand';
import { OfflineState, Page } from '../ui';
import { PageSkeleton } from './PageSkeleton';

/** Pages that are one part of the program, each with a skeleton until it has come and a retry where it can not. */
export function pagesOnDemand<Pages extends object>(load: () => Promise<Pages>) {
  const part = onDemand(load);
  return {
    ...part,
    page: <Props extends object>(pick: (pages: Pages) => ComponentType<Props>): ComponentType<Props> =>
      part.component(pick, {
        loading: <PageSkeleton />,
        failed: (retry) => (
          <Page>
            <OfflineState {...retry} />
          </Page>
        ),
      }),
  };
}
