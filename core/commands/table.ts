/** Menus of the application, in their order. */
export const MENUS = ['File', 'Edit', 'View', 'Mark', 'Note', 'Help'] as const;

export type Menu = (typeof MENUS)[number];

/** A thing that the reader can do. Menu, tool bar, keys and the sheet of keys are all made from this table. */
export interface Command {
  readonly id: string;
  /** Sentence case, as menus and the sheet of keys show it. */
  readonly title: string;
  readonly menu: Menu;
  /** Keys with a modifier; Mod is Ctrl, or Cmd on a Mac: 'Mod+Shift+Z'. Also F6, Delete, Escape and such. */
  readonly key?: string;
  /** A single letter or digit; works only while no text field has the focus, and can be switched off. */
  readonly letter?: string;
  /** One of a group of which one is on: tools, ways to compare, roles. */
  readonly group?: 'tool' | 'compare' | 'role' | 'unit';
  /** Can be on or off by itself. */
  readonly toggle?: boolean;
  /** A line in the menu before this one. */
  readonly separated?: boolean;
}

const command = <const Id extends string>(
  id: Id,
  title: string,
  menu: Menu,
  rest: Omit<Command, 'id' | 'title' | 'menu'> = {},
): Command & { readonly id: Id } => ({ id, title, menu, ...rest });

export const COMMANDS = [
  command('folder.open', 'Open folder…', 'File', { key: 'Mod+O' }),
  command('folder.demonstration', 'Open the synthetic demonstration study', 'File'),
  command('pair.choose', 'Choose pair…', 'File', { key: 'Mod+P', separated: true }),
  command('pair.swap', 'Swap soft and sharp', 'File'),
  command('pair.mask', 'Leave unmarked padding out', 'File', { toggle: true }),
  command('folder.contents', 'Folder contents and files left out…', 'File'),
  command('export.open', 'Export…', 'File', { key: 'Mod+Shift+X', separated: true }),
  command('export.csv', 'Export table as CSV…', 'File', { key: 'Mod+E' }),
  command('export.html', 'Export page as HTML…', 'File', { key: 'Mod+Shift+E' }),
  command('export.json', 'Export note as JSON…', 'File'),

  command('edit.undo', 'Undo', 'Edit', { key: 'Mod+Z' }),
  command('edit.redo', 'Redo', 'Edit', { key: 'Mod+Shift+Z' }),
  command('edit.copyTable', 'Copy table', 'Edit', { key: 'Mod+Shift+C', separated: true }),
  command('region.delete', 'Delete what is selected', 'Edit', { key: 'Delete' }),
  command('edit.settings', 'Settings…', 'Edit', { key: 'Mod+,', separated: true }),

  command('tool.window', 'Window', 'View', { letter: 'w', group: 'tool' }),
  command('tool.move', 'Move', 'View', { letter: 'm', group: 'tool' }),
  command('tool.zoom', 'Zoom', 'View', { letter: 'z', group: 'tool' }),
  command('tool.cut', 'Oblique cut', 'View', { letter: 'q', group: 'tool' }),
  command('cut.leave', 'Back to the slices', 'View', { letter: 'r' }),
  command('cut.delete', 'Delete the oblique cut', 'View'),
  command('slice.next', 'Next slice', 'View', { key: 'PageUp', separated: true }),
  command('slice.previous', 'Previous slice', 'View', { key: 'PageDown' }),
  command('slice.region', 'Go to what is selected', 'View', { letter: 'g' }),
  command('view.fit', 'Fit the image', 'View', { letter: 'f', separated: true }),
  command('view.zoomIn', 'Enlarge', 'View', { letter: '+' }),
  command('view.zoomOut', 'Reduce', 'View', { letter: '-' }),
  command('view.smooth', 'Smooth the display', 'View', { toggle: true }),
  command('compare.open', 'Open', 'View', { letter: '1', group: 'compare', separated: true }),
  command('compare.fold', 'Fold', 'View', { letter: '2', group: 'compare' }),
  command('compare.alternate', 'Alternate', 'View', { letter: '3', group: 'compare' }),
  command('compare.difference', 'Difference', 'View', { letter: '4', group: 'compare' }),
  command('alternate.switch', 'Switch the kernel shown', 'View', { letter: 'x' }),
  command('alternate.hold', 'Other kernel while the key is held', 'View', { letter: 'a' }),
  command('view.noiseAreas', 'Outline the areas used for noise', 'View', {
    letter: 'h',
    toggle: true,
    separated: true,
  }),
  command('view.residuals', 'Show what the fitted stent leaves over', 'View', {
    letter: 'd',
    toggle: true,
  }),
  command('plot.stent', 'Profile and fitted stent', 'View'),
  command('plot.bands', 'Plaque density by bands', 'View'),
  command('plot.visible', 'What could be seen', 'View', { letter: 'y' }),
  command('window.file', 'Window from the file', 'View', { letter: 'i', separated: true }),
  command('window.vessel', 'Window for vessel', 'View', { letter: 'v' }),
  command('window.stent', 'Window for stent and calcium', 'View', { letter: 'c' }),
  command('window.tissue', 'Window for soft tissue', 'View', { letter: 't' }),
  command('window.lung', 'Window for lung', 'View', { letter: 'u' }),
  command('link.scroll', 'Link scrolling', 'View', { toggle: true, separated: true }),
  command('link.window', 'Link window', 'View', { toggle: true }),
  command('link.view', 'Link zoom and position', 'View', { toggle: true }),

  command('tool.ellipse', 'Ellipse', 'Mark', { letter: 'e', group: 'tool' }),
  command('tool.outline', 'Outline', 'Mark', { letter: 'o', group: 'tool' }),
  command('tool.edge', 'Edge line', 'Mark', { letter: 'l', group: 'tool' }),
  command('tool.profile', 'Profile', 'Mark', { letter: 'p', group: 'tool' }),
  command('tool.stent', 'Stent', 'Mark', { letter: 's', group: 'tool' }),
  command('role.lumen', 'Mark as lumen', 'Mark', { group: 'role', separated: true }),
  command('role.wall', 'Mark as wall', 'Mark', { group: 'role' }),
  command('role.plaque', 'Mark as plaque', 'Mark', { group: 'role' }),
  command('role.fat', 'Mark as fat', 'Mark', { group: 'role' }),
  command('role.reference', 'Mark as reference', 'Mark', { group: 'role' }),
  command('region.next', 'Next region', 'Mark', { letter: 'n', separated: true }),
  command('region.previous', 'Previous region', 'Mark', { letter: 'b' }),

  command('note.save', 'Save note now', 'Note', { key: 'Mod+S' }),
  command('region.keyImage', 'Key image of the region…', 'Note', { letter: 'j' }),
  command('note.open', 'Reading note…', 'Note', { key: 'Mod+I' }),
  command('note.recheck', 'Measure the note again…', 'Note'),
  command('repeat.begin', 'Read the regions again, blind', 'Note', { separated: true }),
  command('repeat.skip', 'Skip the region', 'Note'),
  command('repeat.finish', 'Finish the repeat reading', 'Note'),
  command('agreement.open', 'Agreement of readings…', 'Note'),
  command('contrast.new', 'New contrast…', 'Note', { letter: 'k' }),

  command('help.keys', 'Keys', 'Help', { letter: '?' }),
  command('help.numbers', 'What each number means', 'Help', { key: 'F1' }),
  command('help.cautions', 'Cautions', 'Help'),
] as const satisfies readonly Command[];

export type CommandId = (typeof COMMANDS)[number]['id'];
