import { PrivacyPage } from '@/components/releases/PrivacyPage';

export default PrivacyPage;
