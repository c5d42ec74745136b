import { useWatch } from 'react-hook-form';
import { z } from 'zod';

import {
  BoundNumber,
  BoundRadio,
  BoundTextArea,
  chosen,
  Form,
  FormError,
  numberText,
  optionalNumberText,
  SubmitButton,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Button, Dialog, Quiet, useToast } from '@/components/ui';
import { useSaveClaim } from '@/lib/client/catalogue';
import {
  type CatalogueClaim,
  type CataloguePage,
  type ClaimFields,
  claimFieldsSchema,
} from '@/lib/contract/catalogue';
import { limits } from '@/lib/contract/limits';

const { shape } = claimFieldsSchema;
const fromPercent = (typed: number) => typed / 100;
const claimSchema = z.object({
  cycles: numberText(shape.cycles),
  endOfLifeFraction: numberText(shape.endOfLifeFraction, fromPercent),
  depthFraction: optionalNumberText(shape.depthFraction.unwrap(), fromPercent),
  chargeIt: optionalNumberText(shape.chargeIt.unwrap()),
  dischargeIt: optionalNumberText(shape.dischargeIt.unwrap()),
  temperatureC: optionalNumberText(shape.temperatureC.unwrap()),
  clamping: chosen(shape.clamping),
  clampForceN: optionalNumberText(shape.clampForceN.unwrap()),
  whereItStands: shape.whereItStands,
});
type ClaimValues = z.input<typeof claimSchema>;

const clampings = [
  { value: 'clamped', label: 'Clamped' },
  { value: 'none', label: 'Not clamped' },
  { value: 'notStated', label: 'Not stated' },
];

interface ClaimDialogProps {
  entry: CataloguePage;
  /** Null for a new one. */
  claim: CatalogueClaim | null;
  onClose: () => void;
}

/** A claim as its sheet states it; what the sheet leaves open stays empty. */
export function ClaimDialog({ entry, claim, onClose }: ClaimDialogProps) {
  const form = useValidatedForm<ClaimValues, ClaimFields>(claimSchema, valuesOf(claim));
  const { control } = form;
  const save = useSaveClaim(entry.id, claim?.id ?? null);
  const toast = useToast();
  const showErrors = useServerErrors(form, { fieldFor: (path) => path.replace(/^claim\./, '') });
  const clamping = useWatch({ control, name: 'clamping' });
  const send = form.handleSubmit(async (fields) => {
    const read = clamping === 'clamped' ? fields : { ...fields, clampForceN: null };
    try {
      await save.mutateAsync({ version: entry.version, claim: read });
      toast({ text: 'The claim is kept.' });
      onClose();
    } catch (error) {
      showErrors(error);
    }
  });
  const title = claim ? 'Edit the claim' : 'Add a claim';
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <SubmitButton control={control} label="Keep the claim" onPress={send} />
        </>
      }
    >
      <Form label={title} onSubmit={send}>
        <Quiet>
          Leave empty what the sheet does not state. Such a claim is compared with no measured life.
        </Quiet>
        <BoundNumber control={control} name="cycles" label="Cycles" unit="cycles" whole />
        <BoundNumber control={control} name="endOfLifeFraction" label="To capacity left" unit="%" />
        <BoundNumber control={control} name="depthFraction" label="Depth" unit="%" optional />
        <BoundNumber control={control} name="chargeIt" label="Charge rate" unit="It" optional />
        <BoundNumber control={control} name="dischargeIt" label="Discharge rate" unit="It" optional />
        <BoundNumber control={control} name="temperatureC" label="Temperature" unit="°C" optional />
        <BoundRadio control={control} name="clamping" label="Clamping" options={clampings} />
        {clamping === 'clamped' && (
          <BoundNumber control={control} name="clampForceN" label="Clamp force" unit="N" optional />
        )}
        <BoundTextArea
          control={control}
          name="whereItStands"
          label="Where it stands"
          hint="Document, edition, page."
          maxLength={limits.noteLength.max}
          lines={2}
        />
        <FormError control={control} title="This was not kept" />
      </Form>
    </Dialog>
  );
}

const text = (value: number | null) => (value === null ? '' : String(value));
const percent = (value: number | null) => (value === null ? '' : String(Math.round(value * 1000) / 10));

function valuesOf(claim: CatalogueClaim | null): ClaimValues {
  if (!claim)
    return {
      ...{ cycles: '', endOfLifeFraction: '80', depthFraction: '', chargeIt: '', dischargeIt: '' },
      ...{ temperatureC: '', clamping: '', clampForceN: '', whereItStands: '' },
    };
  return {
    cycles: text(claim.cycles),
    endOfLifeFraction: percent(claim.endOfLifeFraction),
    depthFraction: percent(claim.depthFraction),
    chargeIt: text(claim.chargeIt),
    dischargeIt: text(claim.dischargeIt),
    temperatureC: text(claim.temperatureC),
    clamping: claim.clamping,
    clampForceN: text(claim.clampForceN),
    whereItStands: claim.whereItStands,
  };
}
