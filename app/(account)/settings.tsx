import { SettingsPage } from '@/components/members';

export default SettingsPage;
