/** What went wrong with a file, in words for the person who can do something about it. */
import { basename, dirname } from 'node:path';
import { LARGEST_FILE_BYTES, TooLargeError } from './read';

/** One or two sentences: which file, what stands in the way, what to try. `doing` is 'open' or 'save'. */
export function wordFileError(error: unknown, path: string, doing: 'open' | 'save'): string {
  const name = basename(path);
  const failed = doing === 'open' ? `${name} could not be opened` : `${name} could not be saved`;
  if (error instanceof TooLargeError)
    return `${failed}: it is larger than ${LARGEST_FILE_BYTES / 2 ** 20} MB, too large for a plan.`;
  const code = (error as NodeJS.ErrnoException).code ?? '';
  switch (code) {
    case 'ENOENT':
      return doing === 'open'
        ? `${failed}: there is no such file any more. It may have been moved or renamed.`
        : `${failed}: the folder ${dirname(path)} is not there any more. Choose another place with Save as.`;
    case 'EACCES':
    case 'EPERM':
      return doing === 'open'
        ? `${failed}: you have no right to read it.`
        : `${failed}: you have no right to write the file or its folder. Choose another place with Save as.`;
    case 'EROFS':
      return `${failed}: its disk can only be read. Choose another place with Save as.`;
    case 'ENOSPC':
    case 'EDQUOT':
      return `${failed}: the disk is full. The file there is as it was; make room, or choose another place with Save as.`;
    case 'EISDIR':
      return `${failed}: it is a folder.`;
    case 'EBUSY':
    case 'ETXTBSY':
      return `${failed}: another program holds it. Close it there and try again.`;
    case 'ENAMETOOLONG':
      return `${failed}: its name is too long.`;
    default:
      return `${failed} (${code || (error instanceof Error ? error.message : String(error))}).`;
  }
}
