export { CalendarScreen as default } from '@/components/calendar/CalendarScreen';
