import { useQuery } from '@tanstack/react-query';
import { type CSSProperties, type Ref, useState } from 'react';
import { Pressable, StyleSheet, type View } from 'react-native';

import { QueryView } from '@/components/QueryView';
import { color, radius } from '@/components/theme';
import { LoadingState, Skeleton } from '@/components/ui';
import { photoQuery } from '@/lib/client/photos';

import { PhotoDialog } from './PhotoDialog';

const edge = 160;
const thumb: CSSProperties = { display: 'block', maxWidth: edge, maxHeight: edge };

/** A photo of the meter, small; opens large. */
export function PhotoView({ photoId, ref }: { photoId: string; ref?: Ref<View> }) {
  const query = useQuery(photoQuery(photoId, 'thumb'));
  const [isOpen, setIsOpen] = useState(false);
  return (
    <QueryView
      query={query}
      loading={
        <LoadingState label="Loading the photo">
          <Skeleton height={edge} />
        </LoadingState>
      }
    >
      {(address) => (
        <>
          <Pressable
            ref={ref}
            role="button"
            aria-label="Open the photo of the meter"
            aria-haspopup="dialog"
            onPress={() => setIsOpen(true)}
            style={styles.thumb}
          >
            <img src={address} alt="" style={thumb} />
          </Pressable>
          <PhotoDialog photoId={photoId} isOpen={isOpen} onClose={() => setIsOpen(false)} />
        </>
      )}
    </QueryView>
  );
}

const styles = StyleSheet.create({
  thumb: {
    alignSelf: 'flex-start',
    borderWidth: 1,
    borderColor: color.quiet,
    borderRadius: radius.small,
    overflow: 'hidden',
  },
});
