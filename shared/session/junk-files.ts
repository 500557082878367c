/**
 * What operating systems and recording programs leave in a folder and nobody means to send: it is
 * listed and left out. Project files are left out because only the same program in the same
 * version could open them; whoever wants one asks for it.
 */

const systemLeftovers = /^(\.ds_store|thumbs\.db|desktop\.ini|icon\r|\._.*|\..*)$/i;
const leftoverFolders = /(^|\/)(__macosx|\.[^/]+|autosaves?|session file backups)\//i;
const peakCaches =
  /\.(reapeaks|reapindex|pkf|pk|ovw|peak|peaks|wfm|sfk|asd|gpk|mrk|overview|wov)$/i;
const projectFiles =
  /\.(als|alp|flp|ptx|ptf|pts|cpr|npr|rpp|rpp-bak|song|aup|aup3|cwp|cwb|bwproject|reason|rns|sesx|ses|dawproject|omf|aaf|bak|tmp)$/i;
const projectFolders = /\.(logicx|band|flexproj)(\/|$)/i;

/** What a package holds beside the files that were dropped: it is made anew each time. */
const madeForThePackage = /^(track sheet\.pdf|check-report\.json|sha256sums\.txt)$/i;

/** Whether a file (path with `/`) is junk by its name. */
export function isJunk(path: string): boolean {
  const name = path.slice(path.lastIndexOf('/') + 1);
  return (
    madeForThePackage.test(path) ||
    systemLeftovers.test(name) ||
    leftoverFolders.test(path) ||
    peakCaches.test(name) ||
    projectFiles.test(name) ||
    projectFolders.test(path)
  );
}
