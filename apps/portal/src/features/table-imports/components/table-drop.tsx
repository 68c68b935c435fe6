import { FileDrop } from '../../../components/ui/file-drop.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Progress } from '../../../components/ui/progress.tsx';

const tables = {
  'text/csv': ['.csv'],
  'text/plain': ['.txt'],
  'text/tab-separated-values': ['.tsv'],
  'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet': ['.xlsx'],
} as const;
const maximumTableBytes = 10 * 1024 * 1024;

export interface TableDropProps {
  id: string;
  label: string;
  progress: { readonly name: string; readonly sent: number; readonly total: number } | null;
  failure: string | null;
  onFile: (file: File) => void;
  onCancel: () => void;
}

/** Takes a table and says what became of it. */
export function TableDrop({ id, label, progress, failure, onFile, onCancel }: TableDropProps) {
  return (
    <>
      {failure && (
        <Notice tone="failure" live title="The table was not read">
          {failure}
        </Notice>
      )}
      {progress ? (
        <Progress
          label={progress.sent < progress.total ? `Sending ${progress.name}` : `Reading ${progress.name}`}
          done={progress.sent}
          total={progress.total}
          unit="bytes"
          onCancel={onCancel}
        />
      ) : (
        <FileDrop
          id={id}
          label={label}
          accept={tables}
          maxBytes={maximumTableBytes}
          onFiles={([file]) => file && onFile(file)}
        />
      )}
    </>
  );
}
