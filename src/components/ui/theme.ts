const cookieName = "stillneedle-theme";
const yearS = 31_536_000;

type Theme = "auto" | "light" | "dark";

const root = document.documentElement;
const deviceIsDark = matchMedia("(prefers-color-scheme: dark)");

const chosen = (): Theme => {
  const theme = root.dataset["theme"];
  return theme === "light" || theme === "dark" ? theme : "auto";
};
const isDark = () => chosen() === "dark" || (chosen() === "auto" && deviceIsDark.matches);

/** The server reads the cookie, so that the next page comes in the chosen theme at once. */
function choose(theme: Theme): void {
  root.dataset["theme"] = theme;
  const secure = location.protocol === "https:" ? "; Secure" : "";
  document.cookie = `${cookieName}=${theme}; Path=/; SameSite=Lax; Max-Age=${theme === "auto" ? 0 : yearS}${secure}`;
  show();
}

function show(): void {
  for (const button of document.querySelectorAll<HTMLButtonElement>("[data-theme-button]")) {
    button.hidden = false;
    button.textContent = isDark() ? "Light" : "Dark";
    button.setAttribute("aria-label", isDark() ? "Change to the light theme" : "Change to the dark theme");
  }
  for (const option of document.querySelectorAll<HTMLInputElement>("input[name=theme]"))
    option.checked = option.value === chosen();
}

for (const button of document.querySelectorAll("[data-theme-button]"))
  button.addEventListener("click", () => choose(isDark() ? "light" : "dark"));
for (const option of document.querySelectorAll<HTMLInputElement>("input[name=theme]"))
  option.addEventListener("change", () => choose(option.value as Theme));
deviceIsDark.addEventListener("change", show);
show();
