import { useEffect, useState } from 'react';

/** A picture straight from a file, before the register has it. Nothing where this browser can't show the file (HEIC in most). */
export function FilePicture({ file, alt, className = '' }: { readonly file: File; readonly alt: string; readonly className?: string }) {
  const [address, setAddress] = useState<string | null>(null);
  useEffect(() => {
    const made = URL.createObjectURL(file);
    // The address lives outside of React: made with the effect, and given back with it.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setAddress(made);
    return () => URL.revokeObjectURL(made);
  }, [file]);
  return address === null ? null : <img src={address} alt={alt} className={className} onError={() => setAddress(null)} />;
}
