import { useState } from 'react';

import { useImport, useImportPreview } from '@/hooks/useHerd';
import { ApiFailure } from '@/lib/api';
import { newId } from '@/lib/ids';
import type { ImportPreview, ImportRequest } from '@/shared/contracts/herd';
import { t } from '@/shared/messages';
import { failureWords } from '../ui/states';
import { readBase64 } from './readFile';

const mostBytes = 4 * 1024 * 1024;

/** The server's sentence about a field of the request, where that is what was wrong; else about the whole. */
const wordsOf = (error: unknown, ...fields: string[]): string =>
  (error instanceof ApiFailure ? fields.map((field) => error.field(field)).find(Boolean) : undefined) ??
  failureWords(error);

/**
 * One file on its way into a herd. The id is made with the file and stays through every look and every repeated
 * import, so that nothing is done twice; the last rows that were seen stay until newer ones have come.
 */
export function useImportFile(propertyId: string) {
  const looking = useImportPreview(propertyId);
  const importing = useImport(propertyId);
  const [request, setRequest] = useState<ImportRequest | null>(null);
  const [seen, setSeen] = useState<ImportPreview | null>(null);
  const [reading, setReading] = useState(false);
  const [fileError, setFileError] = useState<string | undefined>();

  const look = (next: ImportRequest) => {
    setRequest(next);
    // a repeated call drops the answer of the one before
    looking.mutate(next, { onSuccess: setSeen });
  };
  const forget = () => {
    looking.reset();
    importing.reset();
    setRequest(null);
    setSeen(null);
    setFileError(undefined);
  };
  const take = async (file: File | undefined) => {
    if (!file) return;
    forget();
    if (file.size > mostBytes) return setFileError(t('import.tooLarge'));
    setReading(true);
    try {
      look({ id: newId(), fileName: file.name, contentBase64: await readBase64(file) });
    } catch {
      setFileError(t('import.unreadable'));
    } finally {
      setReading(false);
    }
  };
  return {
    request,
    preview: seen,
    result: importing.data,
    looking: looking.isPending,
    reading: reading || (looking.isPending && !seen),
    committing: importing.isPending,
    fileError: fileError ?? (looking.error && !seen ? wordsOf(looking.error, 'contentBase64', 'fileName') : undefined),
    lookError: looking.error && seen ? wordsOf(looking.error, 'mapping', 'dateOrder', 'defaultClass') : undefined,
    commitError: importing.error ? failureWords(importing.error) : undefined,
    take,
    forget,
    change: (part: Partial<ImportRequest>) => request && look({ ...request, ...part }),
    lookAgain: () => request && look(request),
    commit: () => request && importing.mutate(request),
  };
}
