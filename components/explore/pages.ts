export { ComparePage } from '../compare/ComparePage';
export { PlanPage } from '../plan/PlanPage';
export { QuestionPage } from '../questions/QuestionPage';
export { QuestionsPage } from '../questions/QuestionsPage';
