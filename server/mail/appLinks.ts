/** Addresses inside the web application, for mails and calendar entries. */
export const appLinks = {
  home: (publicUrl: string): string => publicUrl,
  task: (publicUrl: string, taskId: string): string => `${publicUrl}/task/${taskId}`,
  /** For people who may see the plan but not the work. */
  calendar: (publicUrl: string): string => `${publicUrl}/calendar`,
  /** Settings, with the reminders. */
  more: (publicUrl: string): string => `${publicUrl}/more`,
};
