/** Runs are compared by it: it is raised whenever a result may change. */
export const engineVersion = '0.2.0';
