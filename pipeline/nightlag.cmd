@echo off
rem Starts Nightlag from wherever it is called; arguments pass through unchanged.
setlocal
set "java=java"
if defined JAVA_HOME set "java=%JAVA_HOME%\bin\java"
"%java%" -jar "%~dp0target\nightlag.jar" %*
exit /b %ERRORLEVEL%
