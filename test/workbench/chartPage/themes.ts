// Four themes as the editor puts them on a page: classes of its body, and colours as variables. Only the variables that
// the chart's page reads, with plain colours of no theme in particular.

export type ThemeName = "dark" | "light" | "high contrast dark" | "high contrast light";

export interface PageTheme {
  readonly bodyClass: string;
  readonly variables: Readonly<Record<string, string>>;
}

const fonts = { "--vscode-font-family": "Arial, sans-serif", "--vscode-font-size": "13px" };

export const pageThemes: Readonly<Record<ThemeName, PageTheme>> = {
  dark: {
    bodyClass: "vscode-dark",
    variables: {
      ...fonts,
      "--vscode-editor-background": "#1f1f1f",
      "--vscode-editor-foreground": "#cccccc",
      "--vscode-foreground": "#cccccc",
      "--vscode-focusBorder": "#0078d4",
      "--vscode-panel-border": "#2b2b2b",
      "--vscode-editorError-foreground": "#f14c4c",
      "--vscode-editorWarning-foreground": "#cca700",
      "--vscode-button-secondaryBackground": "#313131",
      "--vscode-button-secondaryForeground": "#cccccc",
      "--vscode-button-secondaryHoverBackground": "#3c3c3c",
    },
  },
  light: {
    bodyClass: "vscode-light",
    variables: {
      ...fonts,
      "--vscode-editor-background": "#ffffff",
      "--vscode-editor-foreground": "#3b3b3b",
      "--vscode-foreground": "#3b3b3b",
      "--vscode-focusBorder": "#005fb8",
      "--vscode-panel-border": "#e5e5e5",
      "--vscode-editorError-foreground": "#e51400",
      "--vscode-editorWarning-foreground": "#bf8803",
      "--vscode-button-secondaryBackground": "#e5e5e5",
      "--vscode-button-secondaryForeground": "#3b3b3b",
      "--vscode-button-secondaryHoverBackground": "#cccccc",
    },
  },
  "high contrast dark": {
    bodyClass: "vscode-high-contrast",
    variables: {
      ...fonts,
      "--vscode-editor-background": "#000000",
      "--vscode-editor-foreground": "#ffffff",
      "--vscode-foreground": "#ffffff",
      "--vscode-focusBorder": "#f38518",
      "--vscode-contrastBorder": "#6fc3df",
      "--vscode-button-secondaryForeground": "#ffffff",
    },
  },
  "high contrast light": {
    bodyClass: "vscode-high-contrast vscode-high-contrast-light",
    variables: {
      ...fonts,
      "--vscode-editor-background": "#ffffff",
      "--vscode-editor-foreground": "#292929",
      "--vscode-foreground": "#292929",
      "--vscode-focusBorder": "#006bbd",
      "--vscode-contrastBorder": "#0f4a85",
      "--vscode-button-secondaryForeground": "#ffffff",
      "--vscode-button-secondaryBackground": "#0f4a85",
    },
  },
};
