import Svg, { Path } from 'react-native-svg';
import { color } from '../theme';

// A level that falls in three steps, each stroke beginning where the one above ends and lasting longer, as fade does;
// the notch stands at 80 % of the lowest. public/icon.svg holds the same path.
const path = 'M0 4H8.4V13H17.4V20.5H26L27.7 23.6L29.4 20.5H32V26.5H15.8V19H6.8V10H0Z';

/** The mark, always beside the name or a label that says it. */
export function Mark({ width = 30 }: { width?: number }) {
  return (
    <Svg width={width} height={(width * 24) / 32} viewBox="0 3 32 24" aria-hidden>
      <Path d={path} fill={color.tide} />
    </Svg>
  );
}
