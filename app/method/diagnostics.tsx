import { DiagnosticsPage } from '@/components/method/DiagnosticsPage';

export default DiagnosticsPage;
