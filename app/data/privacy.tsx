import { PrivacyPage } from '@/components/explore';

export default PrivacyPage;
