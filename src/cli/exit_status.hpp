// Exit statuses: a contract with scripts.
#pragma once

namespace bandwright::cli {

enum ExitStatus {
  kMet = 0,          ///< a candidate meets every requirement nominally; or the command did what it was asked
  kNotMet = 1,       ///< none does
  kWrongInput = 2,   ///< the input or the command line is wrong
  kFileTrouble = 3,  ///< a file could not be read or written
  kFault = 4,        ///< an internal fault
  kInterrupted = 130
};

}  // namespace bandwright::cli
