/** Light or dark: the device's choice until someone presses the button; kept on this device. */

const KEY = "farside.look";

/** Turns the page to the other look. `theme/look.js` set the first one before the page was drawn. */
export function look(): void {
  const page = document.documentElement;
  const other = page.dataset["look"] === "dark" ? "light" : "dark";
  page.dataset["look"] = other;
  try {
    localStorage.setItem(KEY, other);
  } catch {
    return; // storage is off: the look lasts as long as the page
  }
}
