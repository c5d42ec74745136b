import { DataPage } from '@/components/explore';

export default DataPage;
