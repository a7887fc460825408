export { PlannerScreen as default } from '@/components/planner/PlannerScreen';
