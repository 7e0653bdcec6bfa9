/** What a policy answers: yes, or the reason why not, as a sentence for the person. */
export type Decision = { allowed: true } | { allowed: false; reason: string };

export const yes: Decision = { allowed: true };
export const no = (reason: string): Decision => ({ allowed: false, reason });
