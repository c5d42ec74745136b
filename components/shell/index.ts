export { AppShell } from './AppShell';
