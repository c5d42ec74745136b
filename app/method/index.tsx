import { MethodPage } from '@/components/method/MethodPage';

export default MethodPage;
