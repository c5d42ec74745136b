import { ComparePage } from '@/components/explore';

export default ComparePage;
