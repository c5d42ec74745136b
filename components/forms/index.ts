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
export { forgetDraft, readDraft, writeDraft } from './draftStore';
export { FieldDisclosure } from './FieldDisclosure';
export { FieldPair } from './FieldPair';
export { Form, FormError, SubmitButton } from './FormParts';
export { durationText, optionalQuantityText, quantityText } from './quantityText';
export { RestoredDraft } from './RestoredDraft';
export { readBy, readThrough } from './readThrough';
export { chosen, numberText, optionalNumberText, optionalText } from './textSchemas';
export { useLocalDraft, type LocalDraft } from './useLocalDraft';
export { useSavedNote } from './useSavedNote';
export { useServerErrors } from './useServerErrors';
export { useValidatedForm, type ValidatedForm } from './useValidatedForm';
