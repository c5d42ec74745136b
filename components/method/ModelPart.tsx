import { Heading, Stack, Text } from '@/components/ui';

import { Equation } from './Equation';

/** The model and its estimation, exactly. */
export function ModelPart() {
  return (
    <Stack gap="m">
      <Heading>The model</Heading>
      <Text>
        A check of bank i of cell type k at age t (years), after n equivalent full cycles, gives a capacity C
        at 25 °C and 0.2 It. C₀ is the rating.
      </Text>
      <Equation
        number={1}
        parts={['ln(C / C₀) =', 'c₀ + cᵢ', '+ ln(1 − q)', '+ e']}
        spoken="the logarithm of capacity over rating is the common start plus the bank's own start plus the logarithm of one minus the fade, plus the error of the check"
      />
      <Equation
        number={2}
        parts={['q =', 'exp(mₖ + uᵢ)', '· (A + B)']}
        spoken="the fade is the sum of calendar and cycling fade, times what is special to the cell type and to the bank"
      />
      <Equation
        number={3}
        parts={['A =', 'exp(ln a', '+ aT · τ', '+ aS · (S − 0.5)', '+ p · ln t)']}
        spoken="calendar fade grows with heat, with the mean charge level and with a power of time"
      />
      <Equation
        number={4}
        parts={[
          'B =',
          'exp(ln b',
          '+ z · ln(n / 500)',
          '+ bD · ln(D / 0.5)',
          '+ bC · ln(I / 0.2)',
          '+ bT · τ',
          '+ bK · clamped)',
        ]}
        spoken="cycling fade grows with a power of the full cycles, of the depth and of the rate, with heat, and changes with clamping"
      />
      <Text>
        Here τ = (1/298.15 − 1/T) / 0.008314 mol/kJ with the cell temperature T in kelvin, S is the mean
        charge level, D the depth and I the rate in It, each over the bank’s whole life. The bank’s start cᵢ,
        its pace uᵢ and the cell type’s pace mₖ are normal about 0, each with its own spread; the error e is
        normal, with the spread that the check’s meter and method give it.
      </Text>
      <Heading>The estimate</Heading>
      <Text>
        The likelihood of all checks is taken with starts and paces integrated out, so that the checks of one
        bank count together and never as independent witnesses: the start in closed form, the pace of banks by
        9 and of cell types by 3 points of adaptive Gauss-Hermite quadrature. The fit maximises it together
        with the priors by Newton steps with exact derivatives. The exponent p is not chosen: the fit is made
        at five values from 0.38 to 0.62, and their answers are mixed by how well each explains the checks. A
        fit that does not converge is not published.
      </Text>
      <Text>
        Checks that their bank’s other checks contradict by more than 4 standard deviations are left out and
        go to a moderator; a bank’s failure is kept. Lives solve ln 0.8 = c₀ + ln(1 − q) for t. Their ranges
        come from the covariance of the parameters on the scale of ln t, with Student’s quantile at cell types
        + 4 degrees of freedom; the range of banks adds the spreads of starts and paces. The share from
        published studies of a quantity with gradient g is
      </Text>
      <Equation
        number={5}
        parts={['share =', 'gᵀ V P V g', '/ gᵀ V g']}
        spoken="the share is g transposed V P V g over g transposed V g, with the covariance V and the priors' precision P"
      />
      <Text>
        with the covariance V and the priors’ precision P. How much of a cell type’s difference is its own
        readings’ word is 1 − se(mₖ)² over the variance of cell types. A label’s claim is carried to a use by
        one factor on q that makes the model meet the claim under its own conditions and in its own time.
      </Text>
    </Stack>
  );
}
