export { AppShell } from './AppShell';
export { Mark } from './Mark';
