// Sets the look before the page is first drawn: the one chosen on this device, else the device's own.
const dark = matchMedia("(prefers-color-scheme: dark)");

function kept() {
  try {
    const look = localStorage.getItem("farside.look");
    return look === "light" || look === "dark" ? look : null;
  } catch {
    return null; // storage is off
  }
}

function setLook() {
  document.documentElement.dataset.look = kept() ?? (dark.matches ? "dark" : "light");
}

setLook();
dark.addEventListener("change", setLook);
