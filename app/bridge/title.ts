/** The window's title: the plan's name first, for narrow task bars, with a mark while it is edited. */
export const windowTitle = (title: string, edited: boolean): string =>
  `${edited ? '• ' : ''}${title === '' ? 'Untitled' : title} – Soakwright`;
