import type { ComponentType } from 'react';

import { PageSkeleton } from '../members/PageSkeleton';
import { onDemand } from '../onDemand';
import { OfflineState, Page } from '../ui';
import type * as Pages from './pages';

// Comparing, planning and the questions are one part of the program; the list of lifetimes does not pay for it.
const explore = onDemand(() => import('./pages'));

const page = <Props extends object>(
  pick: (pages: typeof Pages) => ComponentType<Props>,
): ComponentType<Props> =>
  explore.component(pick, {
    loading: <PageSkeleton />,
    failed: (retry) => (
      <Page>
        <OfflineState {...retry} />
      </Page>
    ),
  });

export const ComparePage = page((pages) => pages.ComparePage);
export const PlanPage = page((pages) => pages.PlanPage);
export const QuestionPage = page((pages) => pages.QuestionPage);
export const QuestionsPage = page((pages) => pages.QuestionsPage);
