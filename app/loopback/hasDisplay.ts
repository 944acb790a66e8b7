/** Whether a window can be shown at all. On Linux an X or Wayland display must be named; elsewhere there is one. */
export function hasDisplay(
  platform: NodeJS.Platform = process.platform,
  environment: Readonly<Record<string, string | undefined>> = process.env,
): boolean {
  if (platform === 'win32' || platform === 'darwin') return true;
  return Boolean(environment.DISPLAY) || Boolean(environment.WAYLAND_DISPLAY);
}
