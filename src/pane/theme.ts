/** Light or dark: as the spreadsheet program says, else as the system says. */

/** Whether a colour such as "#1f1f1f" is dark. */
export function isDark(colour: string): boolean {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(colour);
  if (!match) return false;
  const [red, green, blue] = match.slice(1).map((part) => parseInt(part, 16));
  return 0.2126 * red! + 0.7152 * green! + 0.0722 * blue! < 128;
}

/**
 * Keeps the page's theme.
 *
 * @param background the program's own background colour, where it is known
 * @returns applies the theme anew
 */
export function followTheme(background: () => string | undefined): () => void {
  const system = matchMedia("(prefers-color-scheme: dark)");
  const apply = (): void => {
    const colour = background();
    const dark = colour === undefined ? system.matches : isDark(colour);
    document.documentElement.dataset["theme"] = dark ? "dark" : "light";
  };
  system.addEventListener("change", apply);
  apply();
  return apply;
}
