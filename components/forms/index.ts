export {
  BoundCheckbox,
  BoundDate,
  BoundMonth,
  BoundRadio,
  BoundSelect,
  BoundText,
  BoundTextArea,
} from './BoundFields';
export { BoundNumber } from './BoundNumber';
export { BoundSource } from './BoundSource';
export { Form, FormError, SubmitButton } from './FormParts';
export { chosen, numberText, optionalNumberText, optionalText } from './textSchemas';
export { useLocalDraft, type LocalDraft } from './useLocalDraft';
export { useServerErrors } from './useServerErrors';
export { useValidatedForm, type ValidatedForm } from './useValidatedForm';
