import { useWatch } from 'react-hook-form';

import {
  BoundNumber,
  BoundRadio,
  BoundText,
  FieldPair,
  Form,
  FormError,
  SubmitButton,
  useLocalDraft,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Banner, Button, Dialog, type Option, Quiet, useToast } from '@/components/ui';
import { useProposeCellType } from '@/lib/client/banks';
import { useSession } from '@/lib/client/session';
import type { CellTypeChoice } from '@/lib/contract/banks';
import { limits } from '@/lib/contract/limits';
import type { CellTypeProposal } from '@/lib/contract/proposals';
import { formatQuantity } from '@/lib/units';

import { optionsOf } from './bankWords';
import { emptyProposal, proposalSchema, type ProposalValues } from './proposalValues';
import { similarCellTypes } from './similarCellTypes';

const formats: Option[] = optionsOf({
  prismatic: 'Prismatic, a flat box',
  cylindrical: 'Cylindrical',
  pouch: 'Pouch',
});

interface ProposeCellDialogProps {
  /** Those that can be chosen, to point out which one may be meant. */
  cellTypes: CellTypeChoice[];
  /** Takes the id of what was proposed, or of a listed one that was meant. */
  onChoose: (id: string) => void;
  onClose: () => void;
}

/** Proposes a cell type that is not listed, and chooses it. */
export function ProposeCellDialog({ cellTypes, onChoose, onClose }: ProposeCellDialogProps) {
  const { user } = useSession();
  const toast = useToast();
  const propose = useProposeCellType();
  const form = useValidatedForm<ProposalValues, CellTypeProposal>(proposalSchema, emptyProposal);
  const draft = useLocalDraft(user && `${user.id}/cell-type`, form);
  const showErrors = useServerErrors(form);
  const { control } = form;

  const send = form.handleSubmit(async (proposal) => {
    try {
      const { id, maker, name } = await propose.mutateAsync(proposal);
      draft.clear();
      toast({ text: `${maker} ${name} is proposed and chosen.` });
      onChoose(id);
    } catch (error) {
      showErrors(error);
    }
  });
  const submit = () => void send();

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Propose a cell type"
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <SubmitButton control={control} label="Propose and use it" onPress={submit} />
        </>
      }
    >
      <Form label="Propose a cell type" onSubmit={submit}>
        <Quiet>
          As its data sheet says. You can use it at once; a moderator looks at it before anybody else sees it.
        </Quiet>
        <FieldPair>
          <BoundText control={control} name="maker" label="Maker" maxLength={limits.nameLength.max} />
          <BoundText
            control={control}
            name="name"
            label="Name of the type"
            maxLength={limits.nameLength.max}
          />
        </FieldPair>
        <Meant control={control} cellTypes={cellTypes} onChoose={onChoose} />
        <FieldPair>
          <BoundNumber control={control} name="ratedAh" label="Rated capacity" note="one cell" unit="Ah" />
          <BoundNumber control={control} name="nominalV" label="Nominal voltage" note="one cell" unit="V" />
        </FieldPair>
        <BoundRadio control={control} name="format" label="Format" options={formats} />
        <FieldPair>
          <BoundNumber
            control={control}
            name="faceAreaMm2"
            label="Area of the large face"
            hint="Height times width of the side that is clamped."
            unit="cm²"
            optional
          />
          <BoundNumber control={control} name="massKg" label="Mass" unit="kg" optional />
        </FieldPair>
        <FormError control={control} title="This was not proposed" />
      </Form>
    </Dialog>
  );
}

interface MeantProps extends Pick<ProposeCellDialogProps, 'cellTypes' | 'onChoose'> {
  control: ReturnType<typeof useValidatedForm<ProposalValues, CellTypeProposal>>['control'];
}

/** Listed cell types that go by nearly the same name. */
function Meant({ control, cellTypes, onChoose }: MeantProps) {
  const [maker, name] = useWatch({ control, name: ['maker', 'name'] });
  const similar = similarCellTypes(cellTypes, { maker, name });
  if (similar.length === 0) return null;
  return (
    <Banner
      kind="info"
      title="Did you mean one of these?"
      actions={similar.map((cellType) => (
        <Button
          key={cellType.id}
          label={`${cellType.maker} ${cellType.name}, ${formatQuantity(cellType.ratedAh, 'Ah')}`}
          description={`${cellType.maker} ${cellType.name}, ${formatQuantity(cellType.ratedAh, 'Ah')}: use this one`}
          onPress={() => onChoose(cellType.id)}
        />
      ))}
    />
  );
}
