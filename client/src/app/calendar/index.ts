export { CalendarDialog, isSameScope, type CalendarDialogData } from './calendar-dialog';
export { NewAddress, type NewCalendarAddress } from './new-address';
