import type { LucideIcon } from 'lucide-react-native';
import ArrowLeft from 'lucide-react-native/icons/arrow-left';
import ArrowDown from 'lucide-react-native/icons/arrow-down';
import ArrowUp from 'lucide-react-native/icons/arrow-up';
import Calculator from 'lucide-react-native/icons/calculator';
import Camera from 'lucide-react-native/icons/camera';
import Check from 'lucide-react-native/icons/check';
import ChevronDown from 'lucide-react-native/icons/chevron-down';
import CircleAlert from 'lucide-react-native/icons/circle-alert';
import CircleUser from 'lucide-react-native/icons/circle-user-round';
import CircleQuestionMark from 'lucide-react-native/icons/circle-question-mark';
import CloudOff from 'lucide-react-native/icons/cloud-off';
import Database from 'lucide-react-native/icons/database';
import Inbox from 'lucide-react-native/icons/inbox';
import Info from 'lucide-react-native/icons/info';
import Package from 'lucide-react-native/icons/package-2';
import Scale from 'lucide-react-native/icons/scale';
import ShipWheel from 'lucide-react-native/icons/ship-wheel';
import Sigma from 'lucide-react-native/icons/sigma';
import Stamp from 'lucide-react-native/icons/stamp';
import TrendingDown from 'lucide-react-native/icons/trending-down';
import TriangleAlert from 'lucide-react-native/icons/triangle-alert';
import Upload from 'lucide-react-native/icons/upload';
import X from 'lucide-react-native/icons/x';
import { color, type Color } from '../theme';

const icons = {
  account: CircleUser,
  back: ArrowLeft,
  banks: Package,
  camera: Camera,
  caution: TriangleAlert,
  check: Check,
  close: X,
  compare: Scale,
  data: Database,
  down: ArrowDown,
  error: CircleAlert,
  info: Info,
  lifetimes: TrendingDown,
  method: Sigma,
  offline: CloudOff,
  outbox: Inbox,
  plan: Calculator,
  questions: CircleQuestionMark,
  open: ChevronDown,
  screening: Stamp,
  steward: ShipWheel,
  up: ArrowUp,
  upload: Upload,
} as const satisfies Record<string, LucideIcon>;

export type IconName = keyof typeof icons;

/** A drawing beside words that say the same; never alone, so hidden from screen readers. */
export function Icon({ name, size = 20, tone = 'ink' }: { name: IconName; size?: number; tone?: Color }) {
  const Drawing = icons[name];
  return <Drawing size={size} color={color[tone]} strokeWidth={1.75} aria-hidden />;
}
