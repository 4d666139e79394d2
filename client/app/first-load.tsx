import { Skeleton } from '../ui/skeleton.tsx';

/** While the first page's file is on its way: its shape, not a spinner. */
export function FirstLoad() {
  return (
    <div className="mx-auto max-w-page px-[18px] pt-16 roomy:px-8 wide:px-12">
      <Skeleton lines={6} label="Loading Pourbook" />
    </div>
  );
}
