import { RegisterPage } from '@/components/account/RegisterPage';

export default RegisterPage;
