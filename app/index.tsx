import { LifetimesPage } from '@/components/cells/LifetimesPage';

export default LifetimesPage;
