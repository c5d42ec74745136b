import { DataPage } from '@/components/releases/DataPage';

export default DataPage;
