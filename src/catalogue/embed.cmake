# Puts the data files into the library: a .cpp of byte arrays, written again whenever a file in data/ changes.
#
#   include(catalogue/embed.cmake)
#   bandwright_embed(bandwright)     # adds the generated source to the target
#
# The same file is its own generator: cmake -D folder=DATA -D output=FILE -P embed.cmake

if(CMAKE_SCRIPT_MODE_FILE STREQUAL CMAKE_CURRENT_LIST_FILE)
  file(GLOB_RECURSE files RELATIVE ${folder} ${folder}/*.json)
  list(SORT files)
  set(arrays "")
  set(rows "")
  set(number 0)
  foreach(file IN LISTS files)
    file(READ ${folder}/${file} bytes HEX)
    string(REGEX REPLACE "(..)" "0x\\1," bytes "${bytes}")
    # Lines of 24 bytes: some tools choke on one line of a file's length.
    string(REPEAT "....." 24 line)
    string(REGEX REPLACE "(${line})" "\\1\n" bytes "${bytes}")
    string(APPEND arrays "const unsigned char kFile${number}[] = {\n${bytes}};\n")
    string(APPEND rows "      {\"${file}\", text(kFile${number}, sizeof kFile${number})},\n")
    math(EXPR number "${number} + 1")
  endforeach()
  file(
    WRITE ${output}
    "// Written by src/catalogue/embed.cmake from the files in data/.\n"
    "#include \"catalogue/embedded_files.hpp\"\n\n"
    "namespace bandwright {\n\nnamespace {\n\n${arrays}\n"
    "std::string_view text(const unsigned char* bytes, std::size_t size) {\n"
    "  return {reinterpret_cast<const char*>(bytes), size};\n}\n\n"
    "}  // namespace\n\n"
    "const std::vector<EmbeddedFile>& embedded_files() {\n"
    "  static const std::vector<EmbeddedFile> files = {\n${rows}  };\n  return files;\n}\n\n"
    "}  // namespace bandwright\n")
  return()
endif()

function(bandwright_embed target)
  get_filename_component(folder ${CMAKE_CURRENT_FUNCTION_LIST_DIR}/../../data ABSOLUTE)
  set(output ${CMAKE_CURRENT_BINARY_DIR}/embedded_files.cpp)
  file(GLOB_RECURSE files CONFIGURE_DEPENDS ${folder}/*.json)
  # The list of names is a file of its own, so that a file taken away is noticed too.
  string(REPLACE ";" "\n" names "${files}")
  file(CONFIGURE OUTPUT ${CMAKE_CURRENT_BINARY_DIR}/embedded_files.txt CONTENT "${names}\n")
  add_custom_command(
    OUTPUT ${output}
    COMMAND ${CMAKE_COMMAND} -D folder=${folder} -D output=${output} -P ${CMAKE_CURRENT_FUNCTION_LIST_FILE}
    DEPENDS ${files} ${CMAKE_CURRENT_FUNCTION_LIST_FILE} ${CMAKE_CURRENT_BINARY_DIR}/embedded_files.txt
    COMMENT "Embedding the catalogue"
    VERBATIM)
  target_sources(${target} PRIVATE ${output})
  target_include_directories(${target} PRIVATE ${CMAKE_CURRENT_FUNCTION_LIST_DIR}/..)
endfunction()
