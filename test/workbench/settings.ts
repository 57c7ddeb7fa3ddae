// User settings of the editors that this folder starts. The calm ones leave out what asks, moves by itself or is not
// about the project; the quiet ones, for tests and pictures, also keep the editor from typing along. None is the
// extension's own.

export const calmSettings: Readonly<Record<string, unknown>> = {
  "workbench.colorTheme": "Dark Modern",
  "window.autoDetectColorScheme": false,
  "workbench.startupEditor": "none",
  "workbench.tips.enabled": false,
  "workbench.secondarySideBar.defaultVisibility": "hidden",
  "workbench.layoutControl.enabled": false,
  "workbench.enableExperiments": false,
  "chat.disableAIFeatures": true,
  "chat.commandCenter.enabled": false,
  "telemetry.telemetryLevel": "off",
  "security.workspace.trust.enabled": false,
  "git.openRepositoryInParentFolders": "never",
  "extensions.autoUpdate": false,
  "extensions.autoCheckUpdates": false,
  "extensions.ignoreRecommendations": true,
  "update.mode": "none",
  "typescript.disableAutomaticTypeAcquisition": true,
  "typescript.surveys.enabled": false,
};

export const quietSettings: Readonly<Record<string, unknown>> = {
  ...calmSettings,
  "workbench.reduceMotion": "on",
  "window.commandCenter": false,
  "git.enabled": false,
  "npm.autoDetect": "off",
  "breadcrumbs.enabled": false,
  "editor.minimap.enabled": false,
  "editor.hover.delay": 100,
  "editor.cursorBlinking": "solid",
  "editor.occurrencesHighlight": "off",
  "editor.parameterHints.enabled": false,
  "editor.quickSuggestions": { other: "off", comments: "off", strings: "off" },
  "editor.suggestOnTriggerCharacters": false,
  "editor.autoClosingBrackets": "never",
  "editor.autoClosingQuotes": "never",
  "files.autoSave": "off",
};
