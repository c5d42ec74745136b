import { useWatch } from 'react-hook-form';
import { z } from 'zod';

import {
  BoundCheckbox,
  BoundNumber,
  BoundSelect,
  BoundText,
  chosen,
  Form,
  FormError,
  numberText,
  optionalNumberText,
  SubmitButton,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Banner, Button, Dialog, useToast } from '@/components/ui';
import { useEditCellType } from '@/lib/client/catalogue';
import { type CataloguePage, cellTypeFieldsSchema, type CellTypeFields } from '@/lib/contract/catalogue';
import { limits } from '@/lib/contract/limits';
import { parseNumber } from '@/lib/units';

import { dependentsWords, formatWords } from './catalogueWords';

const { shape } = cellTypeFieldsSchema;
const within = (field: 'faceAreaMm2' | 'massKg') => shape[field].unwrap();
const editSchema = z.object({
  maker: shape.maker,
  name: shape.name,
  format: chosen(shape.format),
  ratedAh: numberText(shape.ratedAh),
  nominalV: numberText(shape.nominalV),
  faceAreaMm2: optionalNumberText(within('faceAreaMm2')),
  massKg: optionalNumberText(within('massKg')),
  isRecomputeAccepted: z.boolean(),
});

type EditValues = z.input<typeof editSchema>;
const text = (value: number | null) => (value === null ? '' : String(value));
const formats = Object.entries(formatWords).map(([value, label]) => ({ value, label }));

/** Puts an entry right; says what hangs on a new rating before it is sent. */
export function EditCellTypeDialog({ entry, onClose }: { entry: CataloguePage; onClose: () => void }) {
  const { maker, name, format, ratedAh, nominalV, faceAreaMm2, massKg } = entry;
  const form = useValidatedForm<EditValues, CellTypeFields & { isRecomputeAccepted: boolean }>(editSchema, {
    ...{ maker, name, format, isRecomputeAccepted: false },
    ...{ ratedAh: text(ratedAh), nominalV: text(nominalV) },
    ...{ faceAreaMm2: text(faceAreaMm2), massKg: text(massKg) },
  });
  const { control } = form;
  const edit = useEditCellType(entry.id);
  const toast = useToast();
  const showErrors = useServerErrors(form);
  const [typedAh, typedV] = useWatch({ control, name: ['ratedAh', 'nominalV'] });
  const isMoved = parseNumber(typedAh) !== ratedAh || parseNumber(typedV) !== nominalV;
  const send = form.handleSubmit(async (fields) => {
    try {
      await edit.mutateAsync({ ...fields, version: entry.version });
      toast({ text: isMoved && entry.checks > 0 ? 'Changed. Its checks are worked out anew.' : 'Changed.' });
      onClose();
    } catch (error) {
      showErrors(error);
    }
  });
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Edit the cell type"
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <SubmitButton control={control} label="Save" onPress={send} />
        </>
      }
    >
      <Form label="Edit the cell type" onSubmit={send}>
        <BoundText control={control} name="maker" label="Maker" maxLength={limits.nameLength.max} />
        <BoundText control={control} name="name" label="Name" maxLength={limits.nameLength.max} />
        <BoundSelect control={control} name="format" label="Format" options={formats} />
        <BoundNumber control={control} name="ratedAh" label="Rated capacity" unit="Ah" />
        <BoundNumber control={control} name="nominalV" label="Nominal voltage" unit="V" />
        {isMoved && entry.checks > 0 && (
          <>
            <Banner kind="caution" title="Much hangs on the rating">
              {`${dependentsWords(entry)} are worked out anew with it, and every life that rests on them is fitted anew.`}
            </Banner>
            <BoundCheckbox control={control} name="isRecomputeAccepted" label="This is meant" />
          </>
        )}
        <BoundNumber control={control} name="faceAreaMm2" label="Face area" unit="mm²" optional />
        <BoundNumber control={control} name="massKg" label="Mass" unit="kg" optional />
        <FormError control={control} title="This was not saved" />
      </Form>
    </Dialog>
  );
}
