export { WEEKDAYS, type Weekday } from '../time/weekday';
