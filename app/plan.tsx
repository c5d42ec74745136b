import { PlanPage } from '@/components/explore';

export default PlanPage;
