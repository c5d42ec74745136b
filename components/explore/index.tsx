import { pagesOnDemand } from '../members/pagesOnDemand';

// What stands behind the list of lifetimes is one part of the program, so that the list does not pay for it.
const { page } = pagesOnDemand(() => import('./pages'));

export const ComparePage = page((pages) => pages.ComparePage);
export const DataPage = page((pages) => pages.DataPage);
export const DiagnosticsPage = page((pages) => pages.DiagnosticsPage);
export const MethodPage = page((pages) => pages.MethodPage);
export const PlanPage = page((pages) => pages.PlanPage);
export const PrivacyPage = page((pages) => pages.PrivacyPage);
export const QuestionPage = page((pages) => pages.QuestionPage);
export const QuestionsPage = page((pages) => pages.QuestionsPage);
