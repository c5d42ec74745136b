import { DiagnosticsPage } from '@/components/explore';

export default DiagnosticsPage;
