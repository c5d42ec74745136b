import { View } from 'react-native';
import { LoadingState, Skeleton } from '../ui';

/** Stands in a chart's place, in its size, while its drawing is loaded. */
export function ChartSkeleton({ height }: { height: number }) {
  return (
    <View style={{ height }}>
      <LoadingState label="Loading the chart">
        <Skeleton height={height} />
      </LoadingState>
    </View>
  );
}
