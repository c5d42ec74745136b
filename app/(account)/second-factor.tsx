import { SecondFactorPage } from '@/components/members';

export default SecondFactorPage;
