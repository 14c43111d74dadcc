export { historyToJson, type JsonElement, type JsonHistory, type JsonTable } from './history-json.ts';
export { jsonText } from './json-text.ts';
