/** The filter between what is in use and what was put away, as the lists of equipment and profiles have it. */
export const inUse = (chosen: string) => ({
  name: 'archived',
  label: 'In use or archived',
  preset: 'no',
  chosen,
  options: [
    { value: 'no', text: 'In use' },
    { value: 'yes', text: 'Archived' },
  ],
});
