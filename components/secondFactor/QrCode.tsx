interface QrCodeProps {
  /** Squares along an edge. */
  size: number;
  /** SVG path of the dark ones, one unit each. */
  path: string;
  label: string;
}

/** Light squares that the standard wants around the code. */
const quietZone = 4;

/** A QR code, dark on light in either theme: readers do not expect it the other way round. */
export function QrCode({ size, path, label }: QrCodeProps) {
  const edge = size + 2 * quietZone;
  return (
    <svg
      className="ebb-qr"
      viewBox={`${-quietZone} ${-quietZone} ${edge} ${edge}`}
      shapeRendering="crispEdges"
      role="img"
      aria-label={label}
    >
      <path d={path} fill="currentColor" />
    </svg>
  );
}
