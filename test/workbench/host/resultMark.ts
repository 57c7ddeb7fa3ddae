// Marks the log lines of the extension host that are test results, for the run that listens to its log.

export const RESULT_MARK = "[loadmark-test-result] ";
