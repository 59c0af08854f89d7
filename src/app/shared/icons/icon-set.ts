// The drawings that the application uses, each a file of Material Symbols (sharp, weight 400), taken in as text
// when the application is built. A new icon is one import and one line of the table.

import accountCircle from '@material-symbols/svg-400/sharp/account_circle.svg' with { loader: 'text' };
import add from '@material-symbols/svg-400/sharp/add.svg' with { loader: 'text' };
import arrowBack from '@material-symbols/svg-400/sharp/arrow_back.svg' with { loader: 'text' };
import arrowForward from '@material-symbols/svg-400/sharp/arrow_forward.svg' with { loader: 'text' };
import assignment from '@material-symbols/svg-400/sharp/assignment.svg' with { loader: 'text' };
import block from '@material-symbols/svg-400/sharp/block.svg' with { loader: 'text' };
import bookmark from '@material-symbols/svg-400/sharp/bookmark.svg' with { loader: 'text' };
import calendarToday from '@material-symbols/svg-400/sharp/calendar_today.svg' with { loader: 'text' };
import check from '@material-symbols/svg-400/sharp/check.svg' with { loader: 'text' };
import chevronRight from '@material-symbols/svg-400/sharp/chevron_right.svg' with { loader: 'text' };
import close from '@material-symbols/svg-400/sharp/close.svg' with { loader: 'text' };
import cloudOff from '@material-symbols/svg-400/sharp/cloud_off.svg' with { loader: 'text' };
import comment from '@material-symbols/svg-400/sharp/comment.svg' with { loader: 'text' };
import contentCopy from '@material-symbols/svg-400/sharp/content_copy.svg' with { loader: 'text' };
import contrast from '@material-symbols/svg-400/sharp/contrast.svg' with { loader: 'text' };
import darkMode from '@material-symbols/svg-400/sharp/dark_mode.svg' with { loader: 'text' };
import deleteIcon from '@material-symbols/svg-400/sharp/delete.svg' with { loader: 'text' };
import download from '@material-symbols/svg-400/sharp/download.svg' with { loader: 'text' };
import draw from '@material-symbols/svg-400/sharp/draw.svg' with { loader: 'text' };
import edit from '@material-symbols/svg-400/sharp/edit.svg' with { loader: 'text' };
import error from '@material-symbols/svg-400/sharp/error.svg' with { loader: 'text' };
import filterList from '@material-symbols/svg-400/sharp/filter_list.svg' with { loader: 'text' };
import fitnessCenter from '@material-symbols/svg-400/sharp/fitness_center.svg' with { loader: 'text' };
import flipCameraAndroid from '@material-symbols/svg-400/sharp/flip_camera_android.svg' with {
  loader: 'text',
};
import forum from '@material-symbols/svg-400/sharp/forum.svg' with { loader: 'text' };
import group from '@material-symbols/svg-400/sharp/group.svg' with { loader: 'text' };
import healing from '@material-symbols/svg-400/sharp/healing.svg' with { loader: 'text' };
import help from '@material-symbols/svg-400/sharp/help.svg' with { loader: 'text' };
import info from '@material-symbols/svg-400/sharp/info.svg' with { loader: 'text' };
import inventory2 from '@material-symbols/svg-400/sharp/inventory_2.svg' with { loader: 'text' };
import keyboard from '@material-symbols/svg-400/sharp/keyboard.svg' with { loader: 'text' };
import lightMode from '@material-symbols/svg-400/sharp/light_mode.svg' with { loader: 'text' };
import link from '@material-symbols/svg-400/sharp/link.svg' with { loader: 'text' };
import listAlt from '@material-symbols/svg-400/sharp/list_alt.svg' with { loader: 'text' };
import lock from '@material-symbols/svg-400/sharp/lock.svg' with { loader: 'text' };
import logout from '@material-symbols/svg-400/sharp/logout.svg' with { loader: 'text' };
import mail from '@material-symbols/svg-400/sharp/mail.svg' with { loader: 'text' };
import menu from '@material-symbols/svg-400/sharp/menu.svg' with { loader: 'text' };
import moreVert from '@material-symbols/svg-400/sharp/more_vert.svg' with { loader: 'text' };
import notifications from '@material-symbols/svg-400/sharp/notifications.svg' with { loader: 'text' };
import pause from '@material-symbols/svg-400/sharp/pause.svg' with { loader: 'text' };
import personAdd from '@material-symbols/svg-400/sharp/person_add.svg' with { loader: 'text' };
import photoCamera from '@material-symbols/svg-400/sharp/photo_camera.svg' with { loader: 'text' };
import playArrow from '@material-symbols/svg-400/sharp/play_arrow.svg' with { loader: 'text' };
import repeat from '@material-symbols/svg-400/sharp/repeat.svg' with { loader: 'text' };
import replay from '@material-symbols/svg-400/sharp/replay.svg' with { loader: 'text' };
import reply from '@material-symbols/svg-400/sharp/reply.svg' with { loader: 'text' };
import schedule from '@material-symbols/svg-400/sharp/schedule.svg' with { loader: 'text' };
import search from '@material-symbols/svg-400/sharp/search.svg' with { loader: 'text' };
import send from '@material-symbols/svg-400/sharp/send.svg' with { loader: 'text' };
import skipNext from '@material-symbols/svg-400/sharp/skip_next.svg' with { loader: 'text' };
import skipPrevious from '@material-symbols/svg-400/sharp/skip_previous.svg' with { loader: 'text' };
import straighten from '@material-symbols/svg-400/sharp/straighten.svg' with { loader: 'text' };
import swapHoriz from '@material-symbols/svg-400/sharp/swap_horiz.svg' with { loader: 'text' };
import timer from '@material-symbols/svg-400/sharp/timer.svg' with { loader: 'text' };
import today from '@material-symbols/svg-400/sharp/today.svg' with { loader: 'text' };
import trendingUp from '@material-symbols/svg-400/sharp/trending_up.svg' with { loader: 'text' };
import tune from '@material-symbols/svg-400/sharp/tune.svg' with { loader: 'text' };
import undo from '@material-symbols/svg-400/sharp/undo.svg' with { loader: 'text' };
import upload from '@material-symbols/svg-400/sharp/upload.svg' with { loader: 'text' };
import videocam from '@material-symbols/svg-400/sharp/videocam.svg' with { loader: 'text' };
import visibility from '@material-symbols/svg-400/sharp/visibility.svg' with { loader: 'text' };
import visibilityOff from '@material-symbols/svg-400/sharp/visibility_off.svg' with { loader: 'text' };
import warning from '@material-symbols/svg-400/sharp/warning.svg' with { loader: 'text' };
import zoomIn from '@material-symbols/svg-400/sharp/zoom_in.svg' with { loader: 'text' };

/** Every icon by name: `<mf-icon name="…" />` accepts these names alone. */
export const ICONS = {
  'account-circle': accountCircle,
  add,
  'arrow-back': arrowBack,
  'arrow-forward': arrowForward,
  assignment,
  block,
  bookmark,
  'calendar-today': calendarToday,
  check,
  'chevron-right': chevronRight,
  close,
  'cloud-off': cloudOff,
  comment,
  'content-copy': contentCopy,
  contrast,
  'dark-mode': darkMode,
  delete: deleteIcon,
  download,
  draw,
  edit,
  error,
  'filter-list': filterList,
  'fitness-center': fitnessCenter,
  'flip-camera-android': flipCameraAndroid,
  forum,
  group,
  healing,
  help,
  info,
  'inventory-2': inventory2,
  keyboard,
  'light-mode': lightMode,
  link,
  'list-alt': listAlt,
  lock,
  logout,
  mail,
  menu,
  'more-vert': moreVert,
  notifications,
  pause,
  'person-add': personAdd,
  'photo-camera': photoCamera,
  'play-arrow': playArrow,
  repeat,
  replay,
  reply,
  schedule,
  search,
  send,
  'skip-next': skipNext,
  'skip-previous': skipPrevious,
  straighten,
  'swap-horiz': swapHoriz,
  timer,
  today,
  'trending-up': trendingUp,
  tune,
  undo,
  upload,
  videocam,
  visibility,
  'visibility-off': visibilityOff,
  warning,
  'zoom-in': zoomIn,
} as const satisfies Record<string, string>;

/** The name of a drawing that the application carries. */
export type IconName = keyof typeof ICONS;
