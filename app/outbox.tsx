import { OutboxPage } from '@/components/account/OutboxPage';

export default OutboxPage;
