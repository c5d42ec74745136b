import { verdictInWords, type Effect } from '../../lib/fit/pooled/effects';
import type { PooledFit } from '../../lib/fit/pooled/fitTypes';
import type { Ranged } from '../../lib/fit/pooled/types';
import { table } from './table';

const leverWords: Record<Effect['lever'], string> = {
  clamping: 'clamping, all rates together',
  clampingLowRate: 'clamping below 0.3 It',
  clampingHighRate: 'clamping above 0.3 It',
  depth: 'depth 0.8 to 0.5, same full cycles',
  rate: 'rate 0.4 to 0.2 It',
  heat: 'cells at 30 to 20 °C',
  chargeLevel: 'mean state of charge 0.7 to 0.5',
};

/** A fit as a page of text: aligned tables, units, verdicts in words. */
export function summaryText(fit: PooledFit): string {
  return [
    dataLines(fit),
    section('Life to 80 % of the rating (90 % range)', lifeTable(fit)),
    section('At the reference: 0.5 deep at 0.2 It, 25 °C, 500 full cycles in 4 years', referenceLines(fit)),
    section('What each lever does to life (life after / life before, 90 % range)', effectTable(fit)),
    section('Parameters', parameterTable(fit)),
    section('Cell types (fade against the average one)', cellTypeTable(fit)),
    section('Does clamping depend on another stress?', interactionTable(fit)),
    section('Clamped and unclamped banks beside each other', balanceTable(fit)),
    section('Screen', screenLines(fit)),
    section('Banks that move a parameter by more than 0.3 standard errors', influenceLines(fit)),
    section('Bear in mind', fit.statements.map((statement) => `- ${statement}`).join('\n')),
  ].join('\n\n');
}

function section(title: string, body: string): string {
  return `${title}\n${body}`;
}

function dataLines({ data, exponent, iterations, totalIterations }: PooledFit): string {
  const kept = data.rows === data.used ? '' : ` (${data.rows - data.used} left out)`;
  const weights = (exponent.weights ?? []).map((one) => `${one.exponent}: ${percent(one.weight)}`).join('  ');
  return [
    `${data.used} of ${data.rows} checks${kept}, ${data.banks} banks, ${data.owners} owners, ${data.cellTypes} cell types`,
    exponent.mode === 'mixed'
      ? `calendar exponent mixed: ${weights}`
      : `calendar exponent fixed at ${exponent.value}`,
    `converged in ${iterations} iterations (${totalIterations} with all refits)`,
    `data sha256 ${data.sha256 ?? 'not given'}`,
  ].join('\n');
}

function lifeTable({ lifetimes }: PooledFit): string {
  return table(
    [
      'use',
      'years',
      '',
      '8 of 10 banks',
      'full cycles',
      'left at reach',
      'reach, y',
      'status',
      'prior share',
    ],
    lifetimes.map((life) => {
      const outside = life.outside.map(({ condition }) => condition).join(', ');
      const status = outside ? `the pool does not reach there (${outside})` : life.status;
      const isMeasured = life.support !== 'notMeasured';
      return [
        life.scenario,
        isMeasured ? life.years.estimate.toFixed(1) : 'not measured yet',
        isMeasured ? range(life.years, 1) : '',
        isMeasured ? range(life.rangeOfBanks, 0) : '',
        isMeasured ? range(life.efc, 0) : '',
        percent(life.capacityAtReach.estimate),
        life.reach.toFixed(1),
        status,
        percent(life.priorShare) + (life.support === 'leans' ? ', leans on published studies' : ''),
      ];
    }),
  );
}

function referenceLines({ atReference: { totalFade, cyclingShare } }: PooledFit): string {
  const inPercent = ({ estimate, lower, upper }: Ranged) =>
    `${(100 * estimate).toFixed(1)} % (${(100 * lower).toFixed(1)} to ${(100 * upper).toFixed(1)} %)`;
  return [
    `fade of the start capacity: ${inPercent(totalFade)}, prior share ${percent(totalFade.priorShare)}`,
    `of it from cycling:         ${inPercent(cyclingShare)}, prior share ${percent(cyclingShare.priorShare)}`,
  ].join('\n');
}

function effectTable({ effects, clampingClasses }: PooledFit): string {
  const rows = effects.map((effect) => [
    leverWords[effect.lever],
    effect.scenario,
    effect.verdict === 'not measured yet' ? '' : effect.lifeRatio.toFixed(2),
    verdictInWords(effect) + (effect.isAtLeast ? ' (at least: inputs are partly guessed)' : ''),
    percent(effect.priorShare) + (effect.isLeaning ? ', leans on published studies' : ''),
    `x ${effect.detectableRatio.toFixed(2)}`,
  ]);
  const classes = clampingClasses.map(
    ({ rateClass, cutIt, clamped, unclamped }) =>
      `${rateClass} ${cutIt} It: ${clamped.banks} clamped banks of ${clamped.owners} owners, ` +
      `${unclamped.banks} unclamped of ${unclamped.owners}`,
  );
  return [
    table(['lever', 'use', 'ratio', 'verdict', 'prior share', 'could have seen'], rows),
    ...classes,
  ].join('\n');
}

function parameterTable({ parameters }: PooledFit): string {
  return table(
    ['', 'estimate', 'se', 'prior', 'prior share'],
    parameters.map((row) => [
      row.name,
      row.estimate.toFixed(4),
      row.se.toFixed(4),
      `${row.priorMean.toFixed(3)} ± ${row.priorSd}`,
      percent(row.priorShare),
    ]),
  );
}

function cellTypeTable({ cellTypes }: PooledFit): string {
  return table(
    ['cell type', 'fade', 'se of ln', 'own share', 'banks', 'owners', 'checks'],
    cellTypes.map((row) => [
      row.cellType,
      `x ${Math.exp(row.m).toFixed(2)}`,
      row.se.toFixed(3),
      percent(row.ownShare),
      ...[row.banks, row.owners, row.checks].map(String),
    ]),
  );
}

function interactionTable({ interactions }: PooledFit): string {
  if (interactions.length === 0) return 'not asked for';
  const rows = interactions.map((one) => [
    `${one.lever} above ${one.cut}`,
    one.estimate.toFixed(3),
    one.se.toFixed(3),
    one.isShown ? 'yes' : 'not shown',
  ]);
  return `${table(['added term', 'estimate', 'se', ''], rows)}\n${interactions.length} were tried.`;
}

function balanceTable({ balance, matched }: PooledFit): string {
  const number = (value: number | null) => (value === null ? '-' : value.toFixed(2));
  const rows = balance.map((row) => [
    row.condition,
    number(row.clampedMean),
    number(row.unclampedMean),
    number(row.standardisedDifference),
  ]);
  const contrast =
    matched.lnDifference === null
      ? 'no class of like conditions holds clamped and unclamped banks'
      : `capacity of clamped banks of like conditions and age: ${signed(matched.lnDifference)} ` +
        `(${signed(matched.lower)} to ${signed(matched.upper)}), the model has ${signed(matched.modelLnDifference)}`;
  return `${table(['mean of', 'clamped', 'unclamped', 'difference / sd'], rows)}\n${contrast}`;
}

function screenLines({ screen, screenRounds, excluded }: PooledFit): string {
  const found = screen.map(
    ({ row, bank, t, action }) =>
      `row ${row}  ${bank}  t ${t.toFixed(1)}  ${action === 'list' ? 'list' : 'quarantine'}`,
  );
  const out = excluded.map(({ row, bank, reason }) => `row ${row}  ${bank}  left out: ${reason}`);
  const all = [...found, ...out];
  return [`${screenRounds} rounds, ${found.length} found`, ...all.slice(0, 40)].join('\n');
}

function influenceLines({ influence }: PooledFit): string {
  if (influence.length === 0) return 'none';
  return influence
    .slice(0, 20)
    .map(({ bank, parameter, shiftInSe }) => `${bank}  ${parameter}  ${shiftInSe.toFixed(2)}`)
    .join('\n');
}

function range({ lower, upper }: Omit<Ranged, 'estimate'>, digits: number): string {
  return `${lower.toFixed(digits)} to ${upper.toFixed(digits)}`;
}

function percent(share: number): string {
  return `${(100 * share).toFixed(0)} %`;
}

function signed(ln: number | null): string {
  if (ln === null) return '-';
  const value = 100 * (Math.exp(ln) - 1);
  return `${value >= 0 ? '+' : '-'}${Math.abs(value).toFixed(1)} %`;
}
