export { Mark } from './Mark';
export type { Place } from './places';
export { Shell, type ShellProps } from './Shell';
