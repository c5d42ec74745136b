export { ActionBar, ActionBarContext } from './ActionBar';
export { Banner, type BannerProps } from './Banner';
export { Button, type ButtonProps } from './Button';
export { Checkbox, type CheckboxProps } from './Checkbox';
export { CheckStateChip, Chip, SeverityChip, type CheckStateName, type FindingSeverity } from './Chip';
export { DateField, MonthField, type DateFieldProps } from './DateField';
export { DefinitionList, type Definition, type DefinitionListProps } from './DefinitionList';
export { Dialog, type DialogProps } from './Dialog';
export { Disclosure, type DisclosureProps } from './Disclosure';
export { EffectBar, type EffectBarProps } from './EffectBar';
export { FieldFrame, type FieldFrameProps, type FieldProps } from './Field';
export { FileDrop, type FileDropProps } from './FileDrop';
export type { GaugeScale } from './gaugeScale';
export { Icon, type IconName } from './Icon';
export { Beside, Divider, Page, Panel, Row, ScreenOnly, Stack, Toolbar } from './Layout';
export { ButtonLink, Link, type LinkProps } from './Link';
export { NumberField, type NumberFieldProps } from './NumberField';
export { PageHead, type PageHeadProps } from './PageHead';
export { Points } from './Points';
export { Progress, Steps, type ProgressProps, type StepsProps } from './Progress';
export { RadioGroup, Segmented, type ChoiceProps, type SegmentedProps } from './RadioGroup';
export { RangeBar, ScaleHead, type RangeBarProps } from './RangeBar';
export { Readout, Readouts, type ReadoutProps } from './Readout';
export { SelectField, type Option, type SelectFieldProps } from './SelectField';
export {
  SentenceUse,
  type ChoiceWord,
  type NumberWord,
  type SentencePart,
  type SentenceUseProps,
} from './SentenceUse';
export { Slider, type SliderProps } from './Slider';
export { ShareBar, type Share } from './ShareBar';
export { LoadingState, Skeleton, SkeletonRows } from './Skeleton';
export { SkipLink } from './SkipLink';
export type { Sort } from './sortRows';
export { EmptyState, ErrorState, OfflineState, type ErrorStateProps } from './States';
export { Table, type Column, type TableProps } from './Table';
export { Figure, Heading, Lead, Quiet, Strong, Text, type TextProps } from './Text';
export { TextArea, TextField, type TextAreaProps, type TextFieldProps } from './TextField';
export { ToastProvider, useToast } from './Toast';
export { useHotkeys } from './useHotkeys';
export { VisuallyHidden } from './VisuallyHidden';
