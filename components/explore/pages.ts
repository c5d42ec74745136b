export { ComparePage } from '../compare/ComparePage';
export { DiagnosticsPage } from '../method/DiagnosticsPage';
export { MethodPage } from '../method/MethodPage';
export { PlanPage } from '../plan/PlanPage';
export { QuestionPage } from '../questions/QuestionPage';
export { QuestionsPage } from '../questions/QuestionsPage';
export { DataPage } from '../releases/DataPage';
export { PrivacyPage } from '../releases/PrivacyPage';
