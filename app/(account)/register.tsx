import { RegisterPage } from '@/components/members';

export default RegisterPage;
