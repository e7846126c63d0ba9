/** Exit codes of the command; 0 also when there were warnings. */
export const EXIT = {
  done: 0,
  ourFault: 1,
  wrongInput: 2,
  notDetermined: 3,
  interrupted: 130,
} as const;
