import { criteria } from "../window/criteria/all.js";

const limitLabels: Readonly<Record<string, string>> = {
  lowest: "lowest temperature studied",
  highest: "highest temperature studied",
};

/**
 * A window criterion, or the study's own limit, in plain words.
 *
 * @param key as in the findings
 */
export function criterionLabel(key: string): string {
  return criteria.find((criterion) => criterion.key === key)?.label ?? limitLabels[key] ?? key;
}
