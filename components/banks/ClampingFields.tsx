import { useWatch } from 'react-hook-form';

import { SpringEstimate, TorqueEstimate } from '@/components/estimates';
import { BoundNumber, BoundRadio, BoundSource } from '@/components/forms';
import { type Option, Stack } from '@/components/ui';
import type { CellTypeChoice } from '@/lib/contract/banks';
import { convert, formatNumber, formatQuantity, parseNumber, pressureKPaOf } from '@/lib/units';

import type { BankFieldsProps } from './bankFormTypes';

const clamping: readonly Option[] = [
  { value: 'none', label: 'Not clamped', hint: 'Loose, or only held in place.' },
  { value: 'rigid', label: 'Rigid end plates', hint: 'Plates and rods that do not give way.' },
  { value: 'sprung', label: 'Sprung end plates', hint: 'Springs or pads keep the force as the cells swell.' },
];

/** How the cells are held, with what force, and how far apart. */
export function ClampingFields({ form, cellTypes }: BankFieldsProps) {
  const { control } = form;
  const held = useWatch({ control, name: 'clamping' });
  return (
    <Stack gap="xl">
      <BoundRadio
        control={control}
        name="clamping"
        label="How the cells are held"
        hint="Never press harder than the cells' maker allows, and never press a swollen cell flat."
        options={clamping}
      />
      {(held === 'rigid' || held === 'sprung') && (
        <ForceFields form={form} cellTypes={cellTypes} isSprung={held === 'sprung'} />
      )}
      <BoundNumber
        control={control}
        name="spacingMm"
        label="Gap between cells"
        hint="0 where they touch; the thickness of what lies between them where something does."
        unit="mm"
        units={['mm', 'in']}
        optional
        footer={<BoundSource control={control} name="sources.spacingMm" of="the gap" />}
      />
    </Stack>
  );
}

function ForceFields({ form, cellTypes, isSprung }: BankFieldsProps & { isSprung: boolean }) {
  const { control, setValue } = form;
  const [torque, force, cellTypeId] = useWatch({
    control,
    name: ['clampTorqueNm', 'clampForceN', 'cellTypeId'],
  });
  const cellType = cellTypes.find(({ id }) => id === cellTypeId);
  const takeOver = (forceN: string) => {
    setValue('clampForceN', forceN, { shouldDirty: true, shouldTouch: true, shouldValidate: true });
    setValue('sources.clampForceN', 'estimated', { shouldDirty: true });
  };
  return (
    <>
      <BoundNumber
        control={control}
        name="clampTorqueNm"
        label="Torque"
        hint="Of each rod's nut, if you used a torque wrench."
        unit="N·m"
        optional
        footer={<BoundSource control={control} name="sources.clampTorqueNm" of="the torque" />}
      />
      <Stack gap="s">
        <BoundNumber
          control={control}
          name="clampForceN"
          label="Clamping force"
          hint={pressureLine(force, cellType) ?? "On the cells' large face, all rods of a row together."}
          unit="N"
          units={['N', 'kgf', 'lbf']}
          optional
          footer={<BoundSource control={control} name="sources.clampForceN" of="the clamping force" />}
        />
        <TorqueEstimate torque={torque} onUse={takeOver} />
        {isSprung && <SpringEstimate onUse={takeOver} />}
      </Stack>
    </>
  );
}

/** "On a face of 350 cm² that is 129 kPa (18.7 psi)." */
function pressureLine(force: string, cellType: CellTypeChoice | undefined): string | undefined {
  const newton = parseNumber(force);
  if (!newton || !cellType?.faceAreaMm2) return undefined;
  const pressureKPa = pressureKPaOf(newton, cellType.faceAreaMm2);
  const face = formatNumber(cellType.faceAreaMm2 / 100, { decimals: 0 });
  const psi = formatQuantity(convert(pressureKPa, 'kPa', 'psi'), 'psi', { decimals: 1 });
  return `On a face of ${face} cm² that is ${formatQuantity(pressureKPa, 'kPa', { decimals: 0 })} (${psi}).`;
}
