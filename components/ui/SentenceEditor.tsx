import { useState } from 'react';
import { parseNumber } from '@/lib/units';
import { Button } from './Button';
import { Stack } from './Layout';
import { NumberField } from './NumberField';
import { RadioGroup } from './RadioGroup';
import type { ChoiceWord, NumberWord } from './SentenceUse';

interface EditorProps<Use, K extends keyof Use> {
  word: ChoiceWord<Use, K> | NumberWord<Use, K>;
  value: Use[K];
  onDone: (value: Use[K]) => void;
}

/** The small editor of one word of the sentence. */
export function SentenceEditor<Use, K extends keyof Use>({ word, value, onDone }: EditorProps<Use, K>) {
  return 'options' in word ? (
    <ChoiceEditor word={word} value={value} onDone={onDone} />
  ) : (
    <NumberEditor word={word} value={value} onDone={onDone} />
  );
}

function ChoiceEditor<Use, K extends keyof Use>({
  word,
  value,
  onDone,
}: EditorProps<Use, K> & { word: ChoiceWord<Use, K> }) {
  const [chosen, setChosen] = useState(word.options.findIndex((option) => option.value === value));
  const option = word.options[chosen];
  return (
    <Stack>
      <RadioGroup
        label={word.label}
        hint={word.hint}
        value={String(chosen)}
        onChange={(index) => setChosen(Number(index))}
        options={word.options.map(({ label, hint, disabled }, index) => ({
          value: String(index),
          label,
          hint,
          disabled,
        }))}
      />
      <Button
        kind="primary"
        wide
        label="Use this"
        disabled={!option}
        onPress={() => option && onDone(option.value)}
      />
    </Stack>
  );
}

function NumberEditor<Use, K extends keyof Use>({
  word,
  value,
  onDone,
}: EditorProps<Use, K> & { word: NumberWord<Use, K> }) {
  const { min, max, step, unit, toShown, fromShown } = word;
  const [text, setText] = useState(String(toShown(value)));
  const [error, setError] = useState<string>();

  const read = (): number | undefined => {
    const number = parseNumber(text);
    return number !== undefined && number >= min && number <= max ? number : undefined;
  };
  const move = (by: number) => {
    const from = parseNumber(text) ?? toShown(value);
    const next = Math.min(max, Math.max(min, Math.round((from + by) / step) * step));
    setText(String(Number(next.toFixed(6))));
    setError(undefined);
  };
  const finish = () => {
    const number = read();
    if (number === undefined) setError(`Enter a number from ${min} to ${max} ${unit}.`);
    else onDone(fromShown(number));
  };

  return (
    <Stack>
      <NumberField
        label={word.label}
        hint={word.hint}
        unit={unit}
        value={text}
        onChange={setText}
        error={error}
      />
      <Stack gap="s">
        <Button label={`Less, by ${step} ${unit}`} onPress={() => move(-step)} wide />
        <Button label={`More, by ${step} ${unit}`} onPress={() => move(step)} wide />
      </Stack>
      <Button kind="primary" wide label="Use this" onPress={finish} />
    </Stack>
  );
}
