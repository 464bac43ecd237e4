// The picture that an app scans, and the same secret in letters for whoever cannot scan.
import type { SecondFactorOffer } from '#shared/accounts/session-schemas.ts';

// A scanner needs four squares of quiet around the picture.
const QUIET = 4;

const inFours = (secret: string): string => secret.replaceAll(/(.{4})(?=.)/g, '$1 ');

export function ScanPicture({ offer }: { offer: SecondFactorOffer }) {
  const { size, path } = offer.picture;
  const side = size + 2 * QUIET;
  return (
    <div className="scan">
      <svg
        viewBox={`${-QUIET} ${-QUIET} ${side} ${side}`}
        role="img"
        aria-label="Picture to scan with your app"
      >
        <rect className="scan-paper" x={-QUIET} y={-QUIET} width={side} height={side} />
        <path className="scan-ink" d={path} shapeRendering="crispEdges" />
      </svg>
      <p>
        Open an app for one-time codes on your telephone and scan the picture. On this very telephone,{' '}
        <a href={offer.uri}>open the app</a>. Or write these letters into it by hand, for codes that change by
        time:
      </p>
      <p className="secret">{inFours(offer.secret)}</p>
    </div>
  );
}
