import { sayBytes, sayBytesOf } from '../../lib/say-bytes.ts';
import { Button } from '../../ui/button.tsx';
import { Icon } from '../../ui/icon.tsx';
import { FilePicture } from './file-picture.tsx';
import type { Upload, UploadList } from './upload-list.ts';

/** Each engine draws its own bar unless it is told not to. */
const BAR =
  'block h-2 w-full max-w-80 appearance-none border-0 bg-rule [&::-moz-progress-bar]:bg-graphite [&::-webkit-progress-bar]:bg-rule [&::-webkit-progress-value]:bg-graphite';

/** Files on their way, and those that did not get there, each with what can be done about it. */
export function UploadRows({ uploads, list }: { readonly uploads: readonly Upload[]; readonly list: UploadList }) {
  if (uploads.length === 0) return null;
  const failed = uploads.filter(({ stage }) => stage.kind === 'failed' && stage.again).length;
  return (
    <div className="mt-4">
      <ul aria-label="Files being sent" className="border-t border-graphite">
        {uploads.map((upload) => (
          <li key={upload.key} className="grid grid-cols-[56px_minmax(0,1fr)] items-center gap-x-3 gap-y-2 border-b border-rule py-2 roomy:grid-cols-[56px_minmax(0,1fr)_auto]">
            <span className="relative block size-14 overflow-hidden bg-bed">
              {upload.stage.kind !== 'refused' && <FilePicture file={upload.file} alt="" className="absolute inset-0 size-full object-cover" />}
            </span>
            <div className="min-w-0">
              <p className="truncate">{upload.file.name}</p>
              <Stage upload={upload} />
            </div>
            <div className="flex flex-wrap gap-2 max-roomy:col-start-2">
              <Deeds upload={upload} list={list} />
            </div>
          </li>
        ))}
      </ul>
      {failed > 1 && (
        <Button className="mt-3" onClick={() => list.again()}>
          Send the {failed} that failed again
        </Button>
      )}
    </div>
  );
}

function Stage({ upload: { file, stage } }: { readonly upload: Upload }) {
  switch (stage.kind) {
    case 'queued':
      return <p className="text-[15px] text-slag">Waits its turn, {sayBytes(file.size)}</p>;
    case 'sending':
      return (
        <>
          <progress value={stage.bytes} max={file.size} aria-label={`Sending ${file.name}`} className={BAR} />
          <p className="text-[15px] text-slag tabular-nums">
            {stage.bytes < file.size ? sayBytesOf(stage.bytes, file.size) : 'All of it is sent; the register is looking at it'}
          </p>
        </>
      );
    case 'stopped':
      return <p className="text-[15px] text-slag">Not sent</p>;
    case 'refused':
    case 'failed':
      return (
        <p className="flex items-baseline gap-2 text-[15px] leading-snug font-semibold text-scale">
          <Icon name="warning" />
          {stage.reason}
        </p>
      );
  }
}

function Deeds({ upload: { key, file, stage }, list }: { readonly upload: Upload; readonly list: UploadList }) {
  const name = <span className="sr-only"> {file.name}</span>;
  if (stage.kind === 'queued' || stage.kind === 'sending') return <Button onClick={() => list.stop(key)}>Stop{name}</Button>;
  return (
    <>
      {(stage.kind === 'stopped' || (stage.kind === 'failed' && stage.again)) && (
        <Button onClick={() => list.again(key)}>
          {stage.kind === 'stopped' ? 'Send it after all' : 'Send again'}
          {name}
        </Button>
      )}
      <Button onClick={() => list.remove(key)}>Off the list{name}</Button>
    </>
  );
}
