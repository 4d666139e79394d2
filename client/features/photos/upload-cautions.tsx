import { useEffect, useState } from 'react';
import { Caution } from '../../ui/caution.tsx';

const SEEN = 'pourbook:seen:before-you-clean';

/** What whoever photographs a mark should know before they clean it: said once in a visit, and no wall. */
export function UploadCautions() {
  const [isNew] = useState(() => !wasSeen());
  useEffect(() => {
    if (isNew) remember();
  }, [isNew]);
  if (!isNew) return null;
  return (
    <div className="max-w-measure">
      <Caution title="Photograph a mark before you clean it">
        <p>
          A wire wheel or a grinder blurs cast letters for good; chalk or a light from one side often shows more. Old paint may hold lead, and old gaskets and lagging asbestos: dry
          scraping, sanding or burning sets them free. Local rules and competent people decide how either is taken off, not this page.
        </p>
      </Caution>
    </div>
  );
}

/** Storage may be forbidden: then it is said again. */
function wasSeen(): boolean {
  try {
    return sessionStorage.getItem(SEEN) !== null;
  } catch {
    return false;
  }
}

function remember(): void {
  try {
    sessionStorage.setItem(SEEN, 'yes');
  } catch {
    // Nothing is lost: see above.
  }
}
