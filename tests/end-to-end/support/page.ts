/** The page's side of the desktop's bridge, for code that tests run in the page. */
import type { DesktopApi } from '../../../main/desktop/contract';

declare global {
  interface Window {
    soakwright: DesktopApi;
  }
}
