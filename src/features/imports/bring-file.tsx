import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { ImportKind } from '../../../shared/imports';
import { ErrorPanel } from '../../components/ui/error-panel';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import { PickFile } from './pick-file';
import { previewFile } from './queries';
import { Questions } from './questions';

type Asked = { file: File; kind: ImportKind };

/** From a file to its questions; another kind means another look at the same file. */
export function BringFile() {
  const [kind, setKind] = useState<ImportKind>('repairs');
  const preview = useMutation({ mutationFn: ({ file, kind: asked }: Asked) => previewFile(file, asked) });
  const file = preview.variables?.file;
  return (
    <>
      <Sheet
        title="Bring a file"
        actions={<HowComputed anchor="imports">what a file may look like</HowComputed>}
      >
        <PickFile
          kind={kind}
          onKind={(next) => {
            setKind(next);
            if (file) preview.mutate({ file, kind: next });
          }}
          onFile={(chosen) => preview.mutate({ file: chosen, kind })}
          isBusy={preview.isPending}
          fileName={file?.name}
        />
        <p role="status" className="sr-only">
          {preview.isPending
            ? 'Looking at the file'
            : preview.data
              ? `${preview.data.fileName} was looked at`
              : ''}
        </p>
      </Sheet>
      {preview.error && (
        <ErrorPanel
          error={preview.error}
          {...(file ? { onRetry: () => preview.mutate({ file, kind }) } : {})}
        />
      )}
      {preview.data && preview.variables && (
        <Questions key={preview.data.spoolId} preview={preview.data} kind={preview.variables.kind} />
      )}
    </>
  );
}
