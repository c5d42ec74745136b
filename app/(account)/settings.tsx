import { SettingsPage } from '@/components/account/SettingsPage';

export default SettingsPage;
