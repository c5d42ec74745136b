import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';

import { QueryView } from '@/components/QueryView';
import { useLayout } from '@/components/theme';
import { Button, Dialog, LoadingState, Quiet, Row, Skeleton } from '@/components/ui';
import { photoQuery } from '@/lib/client/photos';
import { formatPercent } from '@/lib/units';

import { PhotoFrame } from './PhotoFrame';
import { photoZooms, zoomByKey } from './photoZoom';

interface PhotoDialogProps {
  photoId: string;
  isOpen: boolean;
  onClose: () => void;
}

const steps = [
  { label: 'Larger', key: '+' },
  { label: 'Smaller', key: '-' },
  { label: 'Whole', key: '0' },
];

/** The photo large, to read the meter's figures off: zoomed by buttons or keys, moved by scrolling or arrow keys. */
export function PhotoDialog({ photoId, isOpen, onClose }: PhotoDialogProps) {
  const { isPhone } = useLayout();
  const query = useQuery({ ...photoQuery(photoId, 'full'), enabled: isOpen });
  const [place, setPlace] = useState(0);
  const zoom = photoZooms[place] ?? 1;

  useEffect(() => {
    if (!isOpen) return;
    const listen = ({ key, ctrlKey, metaKey, altKey }: KeyboardEvent) => {
      if (!ctrlKey && !metaKey && !altKey) setPlace((from) => zoomByKey(key, from));
    };
    document.addEventListener('keydown', listen);
    return () => document.removeEventListener('keydown', listen);
  }, [isOpen]);

  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="Photo of the meter" wide>
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the photo">
            <Skeleton height={320} />
          </LoadingState>
        }
      >
        {(address) => (
          <>
            <Row>
              {steps.map(({ label, key }) => (
                <Button
                  key={key}
                  label={label}
                  hotkey={isPhone ? undefined : key}
                  onPress={() => setPlace((from) => zoomByKey(key, from))}
                />
              ))}
              <Quiet aria-live="polite">{formatPercent(zoom)}</Quiet>
            </Row>
            <PhotoFrame address={address} zoom={zoom} />
          </>
        )}
      </QueryView>
    </Dialog>
  );
}
