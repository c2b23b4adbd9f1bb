// Files: whole texts in, whole texts out.
#pragma once

#include <optional>
#include <string>

namespace bandwright::cli {

/// A text with the name under which messages speak of it.
struct NamedText {
  std::string name;
  std::string text;
};

/// Reads a file whole, or standard input for "-". Throws FileError.
NamedText read_text(const std::string& path);

/// Where results go: standard output, or a file that is written whole or not at all.
class Destination {
public:
  /// Absent or "-": standard output. Refuses at once, with FileError, what could never be written.
  explicit Destination(const std::optional<std::string>& path);

  /// A regular file is replaced by a finished one of the same permissions; anything else (a device, a pipe) is written
  /// directly. Throws FileError; a reader of standard output that has gone away is no fault.
  void write(const std::string& text) const;

  bool is_standard_output() const { return path_.empty(); }
  const std::string& path() const { return path_; }

private:
  std::string path_;  // with symbolic links followed; empty: standard output
};

/// True where both name the same existing file.
bool same_file(const std::string& a, const std::string& b);

}  // namespace bandwright::cli
