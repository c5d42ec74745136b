import { QuestionsPage } from '@/components/explore';

export default QuestionsPage;
