/** Names of the messages between the page's preload script and the main process. */
export const CHANNELS = {
  chooseFolder: 'shell:choose-folder',
  openDropped: 'shell:open-dropped',
  saveFile: 'shell:save-file',
  reportState: 'shell:report-state',
  command: 'shell:command',
  folder: 'shell:folder',
} as const;
