import { MethodPage } from '@/components/explore';

export default MethodPage;
