import { Disclosure, Link, Stack, Text } from '@/components/ui';

/** The formulas behind a plan, in words and signs. */
export function PlanComputed() {
  return (
    <Disclosure label="How this was computed">
      <Stack gap="s">
        <Text>
          The night’s energy stays the same. Out of the cells come loads / √η, with η the round-trip
          efficiency: half of its loss (on the scale of logarithms) falls on the way out. Depth of a night =
          that energy / (present capacity × rated energy); it rises as the bank fades. Mean rate = that energy
          / hours / rated energy.
        </Text>
        <Text>
          Capacity follows the pool’s published model, quarter by quarter, at the mean depth to date (weighted
          by charge) and the full cycles gone through. Life is when 80 % of the rating is left: a convention,
          not a safety limit. By cycles or by time alone: the same model with only that part of the fade.
        </Text>
        <Text>
          Ranges are those of the typical bank, 90 %: the same path at the pace of the shortest and of the
          longest life in range. Single banks differ more. Past three times what is measured nothing is
          counted.
        </Text>
        <Text>
          Cost per kWh = (first cost + Σ (upkeep + charging)ₜ / (1 + r)ᵗ) / Σ Eₜ / (1 + r)ᵗ, with Eₜ the
          energy delivered by the end of year t. Net gain = Σ (Eₜ × saving − costsₜ) / (1 + r)ᵗ − first cost.
          It is paid back when that sum passes zero. A bank is kept to 80 %; what it is worth then is not
          counted.
        </Text>
        <Text>
          A fixture of price F on a bank of price B pays when (B + F) / a(r, T′) = B / a(r, T), with a(r, n) =
          (1 − (1 + r)⁻ⁿ) / r.
        </Text>
        <Link href="/method">The method, with its equations</Link>
      </Stack>
    </Disclosure>
  );
}
