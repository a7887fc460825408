export { CohortsScreen as default } from '@/components/cohorts/CohortsScreen';
